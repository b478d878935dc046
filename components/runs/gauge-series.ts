import type { RunTraces } from '../../shared/wire/runs';

/** How far the first gauge moved, mm, frame by frame. */
export function gaugeDistance(traces: RunTraces | null): number[] {
  return traces?.gauges[0]?.displacement.map((d) => Math.hypot(...d) * 1000) ?? [];
}

export const gaugeTitle = (traces: RunTraces | null): string => {
  const gauge = traces?.gauges[0];
  return gauge ? `${gauge.id} ${gauge.name.toLowerCase()} moved, mm` : 'No gauge in this run';
};
