import type { TextStyle } from 'react-native';

export const space = { xs: 4, s: 8, m: 12, l: 16, xl: 24, xxl: 32, huge: 48 } as const;
export const RADIUS = 2;
export const TARGET = 44;
export const HAIR = 1;

const SANS = "'IBM Plex Sans', system-ui, sans-serif";
const MONO = "'IBM Plex Mono', ui-monospace, monospace";

const sans = (fontSize: number, lineHeight: number, weight: TextStyle['fontWeight'] = '400'): TextStyle => ({
  fontFamily: SANS,
  fontSize,
  lineHeight,
  fontWeight: weight,
});
const mono = (fontSize: number, lineHeight: number, weight: TextStyle['fontWeight'] = '400'): TextStyle => ({
  fontFamily: MONO,
  fontSize,
  lineHeight,
  fontWeight: weight,
  fontVariant: ['tabular-nums'],
});

/** The lettering of the drawing office: Sans for words, Mono for every quantity. */
export const type = {
  title: sans(28, 34, '600'),
  titlePhone: sans(24, 30, '600'),
  section: sans(17, 24, '600'),
  card: sans(16, 22, '600'),
  body: sans(15, 22),
  strong: sans(15, 22, '600'),
  button: sans(15, 20, '600'),
  dense: sans(14, 20),
  note: sans(13, 18),
  caption: sans(12, 16),
  block: sans(11, 14),
  readout: mono(16, 20, '500'),
  big: mono(20, 26, '500'),
  quantity: mono(14, 20),
  small: mono(12, 16),
  field: sans(16, 22),
} as const;
export type TextVariant = keyof typeof type;
