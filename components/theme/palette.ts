/** Every colour of the interface, by theme. Components use the semantic names only. */
export interface Palette {
  page: string;
  /** inputs and chosen rows */
  paper: string;
  stage: string;
  ink: string;
  /** quieter text */
  ink2: string;
  /** borders of controls, lines that carry meaning */
  edge: string;
  /** decoration only */
  hair: string;
  /** at-rest and centre lines */
  phantom: string;
  kelp: string;
  onKelp: string;
  kelpWash: string;
  apricot: string;
  onApricot: string;
  apricotWash: string;
  plum: string;
}

export const DAY: Palette = {
  page: '#F7F5F0',
  paper: '#FDFCF9',
  stage: '#F7F5F0',
  ink: '#1B1F27',
  ink2: '#545961',
  edge: '#857F70',
  hair: '#D9D4C7',
  phantom: '#6F6A5E',
  kelp: '#1F6F5C',
  onKelp: '#FFFFFF',
  kelpWash: '#E2ECE4',
  apricot: '#AD4A16',
  onApricot: '#FFFFFF',
  apricotWash: '#F7E8DC',
  plum: '#6B2D5C',
};

export const NIGHT: Palette = {
  page: '#14171C',
  paper: '#1A1E24',
  stage: '#1A1E24',
  ink: '#ECE8DF',
  ink2: '#AEB0AE',
  edge: '#7C828B',
  hair: '#30353D',
  phantom: '#9A968C',
  kelp: '#5FC2A5',
  onKelp: '#0E1A16',
  kelpWash: '#1D302C',
  apricot: '#F0A06A',
  onApricot: '#24130A',
  apricotWash: '#35271E',
  plum: '#D79AC6',
};
