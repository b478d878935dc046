/** The one place where the interface's units meet SI. */
export type LengthUnit = 'mm' | 'cm' | 'm';
const PER_METRE: Record<LengthUnit, number> = { mm: 1000, cm: 100, m: 1 };

export const toLength = (metres: number, unit: LengthUnit): number => metres * PER_METRE[unit];
export const fromLength = (value: number, unit: LengthUnit): number => value / PER_METRE[unit];

/** The unit in which a body of this size (m) reads best. */
export const lengthUnitFor = (metres: number): LengthUnit => (metres < 2 ? 'mm' : metres < 20 ? 'cm' : 'm');

/** A number to `figures` significant figures with a true minus, no exponent for everyday sizes. */
export function figures(value: number, count = 3): string {
  if (!Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(count));
  const size = Math.abs(rounded);
  const text = size >= 1e6 || size < 1e-4 ? rounded.toExponential(Math.max(0, count - 1)) : String(rounded);
  return text.replace('-', '−');
}

export const lengthText = (metres: number, unit: LengthUnit, count = 3): string =>
  `${figures(toLength(metres, unit), count)} ${unit}`;

/** Pa as Pa, kPa, MPa or GPa. */
export function stressText(pascals: number): string {
  const size = Math.abs(pascals);
  if (size >= 1e9) return `${figures(pascals / 1e9)} GPa`;
  if (size >= 1e6) return `${figures(pascals / 1e6)} MPa`;
  if (size >= 1e3) return `${figures(pascals / 1e3)} kPa`;
  return `${figures(pascals)} Pa`;
}

export const massText = (kilograms: number): string =>
  kilograms < 1
    ? `${figures(kilograms * 1000)} g`
    : kilograms >= 1000
      ? `${figures(kilograms / 1000)} t`
      : `${figures(kilograms)} kg`;

/** Names of units a model file may be drawn in, in metres. */
export const MODEL_UNITS = [
  { name: 'millimetres', short: 'mm', metres: 0.001 },
  { name: 'centimetres', short: 'cm', metres: 0.01 },
  { name: 'metres', short: 'm', metres: 1 },
  { name: 'inches', short: 'in', metres: 0.0254 },
  { name: 'feet', short: 'ft', metres: 0.3048 },
] as const;

/** A length compared with something everybody knows. */
export function likeWhat(metres: number): string {
  const things: [number, string][] = [
    [0.005, 'as a grain of rice'],
    [0.02, 'as a hazelnut'],
    [0.1, 'as an egg'],
    [0.35, 'as a loaf of bread'],
    [0.8, 'as a chair’s back'],
    [1.4, 'as a table'],
    [2.3, 'as a door'],
    [6, 'as a car'],
    [15, 'as a house'],
    [60, 'as a church'],
    [200, 'as two football pitches'],
  ];
  return things.find(([limit]) => metres <= limit)?.[1] ?? 'as a village';
}

/** HH:MM of a moment, where the reader is. */
export const clockText = (moment: Date): string =>
  moment.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });

export const dateText = (iso: string): string =>
  new Date(iso).toLocaleString('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' });
