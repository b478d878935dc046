/** The scale bar's length: the 1–2–5 number of metres that takes 60 to 150 pixels. */
export function scaleBar(metresPerPixel: number): { metres: number; pixels: number } {
  const widest = 150 * metresPerPixel;
  const decade = 10 ** Math.floor(Math.log10(widest));
  const step = [5, 2, 1].find((s) => s * decade <= widest * (1 + 1e-9)) ?? 1;
  const metres = step * decade;
  return { metres, pixels: metres / metresPerPixel };
}

const PER_METRE = { mm: 1000, cm: 100, m: 1 } as const;

/** "50 mm": a length in metres as the chosen unit, without a float's tail. */
export function lengthText(metres: number, unit: keyof typeof PER_METRE): string {
  return `${Number((metres * PER_METRE[unit]).toPrecision(4))} ${unit}`;
}
