import { scaleLinear, scaleLog } from 'd3-scale';
import { line } from 'd3-shape';
import type { Kernels } from '../kernels/kernels';
import { prepare } from '../quadrature/prepare';
import type { Body } from './bodies';
import { shaken } from './bodies';
import { newtonIteration } from './newton-iteration';
import { round } from './statistics';

export interface Growth {
  parts: number;
  unknowns: number;
  points: number;
  setupSeconds: number;
  iterationMilliseconds: number;
}

/** Set-up and one Newton iteration of the same body with more and more parts. */
export function growth(body: Body, counts: readonly number[], kernels: Kernels): Growth[] {
  return counts.map((count) => {
    const scene = shaken(body, count, 'backward-euler', 1);
    const begin = performance.now();
    const prepared = prepare(scene, body.patches);
    const setupSeconds = round((performance.now() - begin) / 1000);
    const { parts, points } = prepared;
    return {
      parts: parts.count,
      unknowns: parts.count * 3 * parts.basis,
      points: points.count,
      setupSeconds,
      iterationMilliseconds: newtonIteration(prepared, scene, kernels, null).milliseconds,
    };
  });
}

const WIDTH = 520;
const HEIGHT = 300;
const LEFT = 64;
const FOOT = 44;

/** The growth as a drawing: milliseconds of an iteration against parts, both logarithmic, points beside each mark. */
export function growthDrawing(rows: readonly Growth[]): string {
  const counts = rows.map(({ parts }) => parts);
  const times = rows.map(({ iterationMilliseconds }) => iterationMilliseconds);
  const x = scaleLog([Math.min(...counts) * 0.9, Math.max(...counts) * 1.3], [LEFT, WIDTH - 20]);
  const y = scaleLog([Math.min(...times) / 1.5, Math.max(...times) * 1.5], [HEIGHT - FOOT, 20]);
  const path = line<Growth>()
    .x((row) => x(row.parts))
    .y((row) => y(row.iterationMilliseconds))([...rows]);
  const text = (px: number, py: number, words: string, anchor = 'middle') =>
    `<text x="${px.toFixed(1)}" y="${py.toFixed(1)}" text-anchor="${anchor}">${words}</text>`;
  const marks = rows.map((row) => {
    const [px, py] = [x(row.parts), y(row.iterationMilliseconds)];
    return [
      `<circle cx="${px.toFixed(1)}" cy="${py.toFixed(1)}" r="4" fill="#1f6f5c"/>`,
      text(px - 8, py - 8, `${row.iterationMilliseconds} ms, ${row.points} points`, 'end'),
      `<path d="M${px.toFixed(1)} ${HEIGHT - FOOT}v5" stroke="#857f70"/>`,
      text(px, HEIGHT - FOOT + 20, String(row.parts)),
    ].join('');
  });
  const share = scaleLinear([0, 1], [LEFT, WIDTH - 20]);
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${HEIGHT}" font-family="IBM Plex Sans, sans-serif" font-size="12" fill="#1b1f27">
<rect width="${WIDTH}" height="${HEIGHT}" fill="#f7f5f0"/>
${text(LEFT, 14, 'one Newton iteration, ms (log)', 'start')}
<path d="M${share(0)} ${HEIGHT - FOOT}H${share(1)}" stroke="#857f70"/>
<path d="${path}" fill="none" stroke="#1f6f5c" stroke-width="2"/>
${marks.join('\n')}
${text(WIDTH - 20, HEIGHT - 6, 'parts (log)', 'end')}
</svg>
`;
}
