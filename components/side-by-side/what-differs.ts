import type { SceneDocument } from '../../shared/scene-document';
import { figures, stressText } from '../../shared/units';

export interface Difference {
  name: string;
  left: string;
  right: string;
}

/** Settings of two scene documents in plain words: those that differ, and how many there are in all. */
export function whatDiffers(
  left: SceneDocument,
  right: SceneDocument,
): { differences: Difference[]; settings: number } {
  const a = settingsOf(left);
  const b = settingsOf(right);
  const names = [...new Set([...a.keys(), ...b.keys()])];
  const differences = names
    .map((name) => ({ name, left: a.get(name) ?? '–', right: b.get(name) ?? '–' }))
    .filter((row) => row.left !== row.right);
  return { differences, settings: names.length };
}

function settingsOf(document: SceneDocument): Map<string, string> {
  const out = new Map<string, string>();
  const many = document.materials.length > 1;
  for (const m of document.materials) {
    const of = many ? ` of ${m.id}` : '';
    out.set(`Material${of}`, m.name);
    out.set(`Law${of}`, m.law.replace(/-/g, ' '));
    out.set(`Young’s modulus${of}`, stressText(m.youngsModulus));
    out.set(`Poisson’s ratio${of}`, figures(m.poissonsRatio));
    out.set(`Density${of}`, `${figures(m.density)} kg/m³`);
  }
  out.set('Part count', String(document.parts.count));
  out.set('Detail of a part', document.parts.order);
  out.set('Bond distance', `${figures(document.bondDistance * 1000)} mm`);
  for (const s of document.supports) {
    out.set(`Support ${s.id}, where`, words(s.region));
    out.set(`Support ${s.id}, holds`, s.axes.join(' '));
    out.set(
      `Support ${s.id}, path`,
      s.keys.length === 0
        ? 'fixed'
        : s.keys.map((k) => `${k.time} s: ${k.translation.map((x) => figures(x * 1000)).join(' ')} mm`).join('; '),
    );
  }
  for (const load of document.loads) {
    const name = `${load.name} ${load.id}`;
    if (load.kind === 'gravity') out.set('Gravity', `${load.acceleration.map((x) => figures(x)).join(' ')} m/s²`);
    else if (load.kind === 'push') out.set(name, `${load.force.map((x) => figures(x)).join(' ')} N`);
    else if (load.kind === 'wind') out.set(name, `${load.velocity.map((x) => figures(x)).join(' ')} m/s`);
    else if (load.kind === 'traction') out.set(name, `${load.traction.map((x) => figures(x)).join(' ')} Pa`);
    else out.set(name, `${figures(load.pressure)} Pa`);
  }
  const ground = document.obstacles[0];
  out.set('Ground', ground ? `at ${figures(ground.height * 1000)} mm, friction ${figures(ground.friction)}` : 'none');
  const { time } = document;
  if (time.kind === 'motion') {
    out.set('Frames per second', figures(time.framesPerSecond, 4));
    out.set('Frames', String(time.frames));
    out.set('Substeps', String(time.substeps));
    out.set('Method', time.method === 'hht' ? 'HHT' : 'backward Euler');
  }
  return out;
}

const words = (region: unknown): string =>
  JSON.stringify(region).replace(/["{}]/g, '').replace(/,/g, ', ').slice(0, 90);
