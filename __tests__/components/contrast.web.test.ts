import { DAY, NIGHT, type Palette } from '../../components/theme/palette';

// WCAG 2.2, success criteria 1.4.3 (text, 4.5) and 1.4.11 (lines that carry meaning, 3).
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const c = parseInt(hex.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
}

function contrast(a: string, b: string): number {
  const [light, dark] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (light! + 0.05) / (dark! + 0.05);
}

const TEXT: [keyof Palette, keyof Palette][] = [
  ['ink', 'page'],
  ['ink', 'paper'],
  ['ink', 'stage'],
  ['ink', 'kelpWash'],
  ['ink', 'apricotWash'],
  ['ink2', 'page'],
  ['ink2', 'paper'],
  ['ink2', 'kelpWash'],
  ['phantom', 'stage'],
  ['kelp', 'page'],
  ['kelp', 'paper'],
  ['onKelp', 'kelp'],
  ['apricot', 'page'],
  ['apricot', 'paper'],
  ['apricot', 'apricotWash'],
  ['onApricot', 'apricot'],
  ['plum', 'page'],
];

describe.each([
  ['day', DAY],
  ['night', NIGHT],
] as const)('%s', (_, palette) => {
  it.each(TEXT)('%s reads on %s', (ink, ground) => {
    expect(contrast(palette[ink], palette[ground])).toBeGreaterThanOrEqual(4.5);
  });

  it.each(['page', 'paper', 'stage'] as const)('edges of controls are seen on %s', (ground) => {
    expect(contrast(palette.edge, palette[ground])).toBeGreaterThanOrEqual(3);
  });
});
