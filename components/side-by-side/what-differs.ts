import type { SceneDocument } from '../../shared/scene-document';
import { LAW_WORDS } from '../../shared/words';
import { figures, stressText } from '../../shared/units';

export interface Difference {
  name: string;
  left: string;
  right: string;
}

/** Settings of two scene documents in plain words: those that differ, those that are the same. */
export function whatDiffers(
  left: SceneDocument,
  right: SceneDocument,
): { differences: Difference[]; same: Difference[]; settings: number } {
  const a = settingsOf(left);
  const b = settingsOf(right);
  const rows = [...new Set([...a.keys(), ...b.keys()])].map((name) => ({
    name,
    left: a.get(name) ?? 'none',
    right: b.get(name) ?? 'none',
  }));
  return {
    differences: rows.filter((row) => row.left !== row.right),
    same: rows.filter((row) => row.left === row.right),
    settings: rows.length,
  };
}

type Settings = Map<string, string>;
type Region = SceneDocument['supports'][number]['region'];

function settingsOf(document: SceneDocument): Settings {
  const out: Settings = new Map();
  materialsOf(document, out);
  out.set('Part count', String(document.parts.count));
  out.set('Detail of a part', document.parts.order);
  out.set('Bond distance', `${mm(document.bondDistance)} mm`);
  out.set('Unit of the model', `${figures(document.unit * 1000)} mm`);
  out.set('Up', document.up);
  supportsOf(document, out);
  loadsOf(document, out);
  obstaclesOf(document, out);
  for (const gauge of document.gauges) out.set(`Gauge ${gauge.id}`, `at ${point(gauge.point)} mm`);
  timeOf(document, out);
  return out;
}

function materialsOf({ materials }: SceneDocument, out: Settings): void {
  for (const m of materials) {
    const of = materials.length > 1 ? `, ${m.id}` : '';
    out.set(`Material${of}`, m.name);
    out.set(`Law${of}`, LAW_WORDS[m.law]);
    out.set(`Young’s modulus${of}`, stressText(m.youngsModulus));
    out.set(`Poisson’s ratio${of}`, figures(m.poissonsRatio));
    out.set(`Loss${of}`, figures(m.loss ?? 0));
    out.set(`Density${of}`, `${figures(m.density)} kg/m³`);
    if (materials.length > 1) out.set(`Where${of}`, m.patches ? patchWords(m.patches) : 'all other patches');
  }
}

function supportsOf({ supports }: SceneDocument, out: Settings): void {
  for (const s of supports) {
    out.set(`Support ${s.id}, where`, regionInFull(s.region));
    out.set(`Support ${s.id}, holds`, s.axes.join(' '));
    out.set(
      `Support ${s.id}, path`,
      s.keys.length === 0
        ? 'stands still'
        : s.keys
            .map(
              (k) =>
                `${figures(k.time)} s: ${point(k.translation)} mm${k.rotationDegrees.some((x) => x !== 0) ? `, ${numbers(k.rotationDegrees)}°` : ''}`,
            )
            .join('; '),
    );
  }
}

function loadsOf({ loads }: SceneDocument, out: Settings): void {
  for (const load of loads) {
    const name = load.kind === 'gravity' ? `Gravity ${load.id}` : `${load.name} ${load.id}`;
    switch (load.kind) {
      case 'gravity':
        out.set(name, `${numbers(load.acceleration)} m/s²`);
        break;
      case 'push':
        out.set(name, `${numbers(load.force)} N`);
        out.set(
          `${name}, when`,
          `${figures(load.from)} s to ${load.until === null ? 'the end' : `${figures(load.until)} s`}`,
        );
        break;
      case 'wind':
        out.set(name, `${numbers(load.velocity)} m/s`);
        out.set(
          `${name}, gusts`,
          load.gusts ? `up to ${figures(load.gusts.factor)} ×, ${figures(load.gusts.seconds)} s` : 'steady',
        );
        out.set(`${name}, drag`, `${figures(load.dragCoefficient)} at ${figures(load.airDensity)} kg/m³`);
        break;
      case 'twist':
        out.set(name, `${figures(load.moment)} N m about ${numbers(load.axis)}`);
        out.set(
          `${name}, when`,
          `${figures(load.from)} s to ${load.until === null ? 'the end' : `${figures(load.until)} s`}`,
        );
        break;
      case 'traction':
        out.set(name, `${numbers(load.traction)} Pa`);
        break;
      case 'pressure':
        out.set(name, stressText(load.pressure));
        break;
    }
    if ('region' in load) out.set(`${name}, where`, regionInFull(load.region));
  }
}

function obstaclesOf({ obstacles }: SceneDocument, out: Settings): void {
  const ground = obstacles.find((obstacle) => obstacle.kind === 'ground');
  out.set('Ground', ground?.kind === 'ground' ? `at ${mm(ground.height)} mm` : 'none');
  for (const obstacle of obstacles) {
    const of = obstacle.kind === 'ground' ? 'the ground' : obstacle.id;
    if (obstacle.kind === 'sphere')
      out.set(`Sphere ${obstacle.id}`, `${mm(obstacle.radius)} mm about ${point(obstacle.centre)} mm`);
    if (obstacle.kind === 'box') out.set(`Box ${obstacle.id}`, `${point(obstacle.min)} to ${point(obstacle.max)} mm`);
    out.set(`Friction of ${of}`, figures(obstacle.friction));
  }
}

function timeOf({ time }: SceneDocument, out: Settings): void {
  if (time.kind === 'static') {
    out.set('Solved as', `rest under load, ${time.loadSteps} steps`);
    return;
  }
  out.set('Solved as', 'motion');
  out.set('Frames per second', figures(time.framesPerSecond, 4));
  out.set('Frames', String(time.frames));
  out.set('Substeps', String(time.substeps));
  out.set('Method', METHOD_NAMES[time.method]);
}

const METHOD_NAMES = { 'backward-euler': 'backward Euler', bdf2: 'BDF2', hht: 'HHT', 'tr-bdf2': 'TR-BDF2' } as const;

const mm = (metres: number) => figures(metres * 1000);
const numbers = (v: readonly number[]) => v.map((x) => figures(x)).join(' ');
const point = (v: readonly number[]) => v.map(mm).join(' ');

const MOST_PATCHES = 12;

function patchWords(patches: readonly number[]): string {
  const named = patches.slice(0, MOST_PATCHES).join(' ');
  const rest = patches.length - MOST_PATCHES;
  return `patch${patches.length === 1 ? '' : 'es'} ${named}${rest > 0 ? ` and ${rest} more` : ''}`;
}

function regionInFull(region: Region): string {
  switch (region.kind) {
    case 'all':
      return 'the whole surface';
    case 'plane':
      return `within ${mm(region.tolerance)} mm of the plane through ${point(region.point)} mm, normal ${numbers(region.normal)}`;
    case 'box':
      return `box ${point(region.min)} to ${point(region.max)} mm`;
    case 'sphere':
      return `within ${mm(region.radius)} mm of ${point(region.centre)} mm`;
    case 'patches':
      return patchWords(region.patches);
  }
}
