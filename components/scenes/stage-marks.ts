import type { SceneDocument } from '../../shared/scene-document';
import { figures } from '../../shared/units';
import type { Ready, Vec3 } from '../../solver/index';
import type { StageMark } from '../stage/stage-types';
import { regionPlace, type Region } from './region-words';

/** Lettered marks of a scene's gauges, supports and pushes, at rest places. */
export function stageMarks(document: SceneDocument, ready: Ready): StageMark[] {
  const place = (region: Region): Vec3 =>
    regionPlace(region) ?? patchesPlace(ready, region.kind === 'patches' ? region.patches : null);
  return [
    ...document.gauges.map((gauge): StageMark => ({ id: gauge.id, kind: 'gauge', at: gauge.point })),
    ...document.supports.map(
      (support): StageMark => ({
        id: support.id,
        kind: 'support',
        at: place(support.region),
        text: support.keys.length > 0 ? 'carried' : undefined,
      }),
    ),
    ...document.loads.flatMap((load): StageMark[] => {
      if (load.kind === 'push')
        return [
          {
            id: load.id,
            kind: 'load',
            at: place(load.region),
            direction: load.force,
            text: `${figures(Math.hypot(...load.force))} N`,
          },
        ];
      if (load.kind === 'twist') {
        return [
          {
            id: load.id,
            kind: 'load',
            at: place(load.region),
            direction: load.axis,
            text: `${figures(load.moment)} N m`,
          },
        ];
      }
      if (load.kind === 'wind') {
        return [
          {
            id: load.id,
            kind: 'load',
            at: windward(ready, load.velocity),
            direction: load.velocity,
            text: `${figures(Math.hypot(...load.velocity))} m/s`,
          },
        ];
      }
      return [];
    }),
  ];
}

function patchesPlace({ surface }: Ready, patches: readonly number[] | null): Vec3 {
  const wanted = patches ? new Set(patches) : null;
  const sum: Vec3 = [0, 0, 0];
  let n = 0;
  for (let v = 0; v < surface.patch.length; v++) {
    if (wanted && !wanted.has(surface.patch[v]!)) continue;
    for (let d = 0; d < 3; d++) sum[d]! += surface.positions[3 * v + d]!;
    n++;
  }
  return n === 0 ? sum : (sum.map((x) => x / n) as Vec3);
}

/** The point of the box where the wind arrives. */
function windward({ report }: Ready, velocity: Vec3): Vec3 {
  const { min, max } = report.bounds;
  return [0, 1, 2].map((d) =>
    Math.abs(velocity[d]!) < 1e-9 ? (min[d]! + max[d]!) / 2 : velocity[d]! > 0 ? min[d]! : max[d]!,
  ) as Vec3;
}
