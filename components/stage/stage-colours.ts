/** Colours of the stage (the drawn body and its ground) in both themes; everything else takes theme tokens. */
export type Scheme = 'day' | 'night';

export interface StageColours {
  ground: string;
  clay: string;
  /** plates and stiff cores, cooler */
  core: string;
  left: string;
  right: string;
  chosen: string;
  parts: readonly string[];
  skyLight: string;
  bounceLight: string;
  keyStrength: number;
  skyStrength: number;
  shadow: number;
}

const PART_TINTS_DAY = ['#DCC7A6', '#BFCDBB', '#C9B6C4', '#B7C6D3', '#E0BFA9', '#CFCB9F', '#B9CBC9', '#D5BDB8'];
const PART_TINTS_NIGHT = ['#9C8A6B', '#7E8F7B', '#8C7787', '#748797', '#A3826B', '#908C60', '#788E8C', '#98807B'];

export const STAGE_COLOURS: Record<Scheme, StageColours> = {
  day: {
    ground: '#F7F5F0',
    clay: '#DFCFB6',
    core: '#DEDCD6',
    left: '#B7CFC2',
    right: '#CDB4C6',
    chosen: '#1F6F5C',
    parts: PART_TINTS_DAY,
    skyLight: '#FFFFFF',
    bounceLight: '#E8DCC8',
    keyStrength: 1.75,
    skyStrength: 1.65,
    shadow: 0.26,
  },
  night: {
    ground: '#1A1E24',
    clay: '#9C8E7C',
    core: '#8E9194',
    left: '#6E9587',
    right: '#94748B',
    chosen: '#5FC2A5',
    parts: PART_TINTS_NIGHT,
    skyLight: '#DDE4EE',
    bounceLight: '#4A4238',
    keyStrength: 1.6,
    skyStrength: 1.1,
    shadow: 0.5,
  },
};
