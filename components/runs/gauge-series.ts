import type { RunTraces } from '../../shared/wire/runs';

/** How far the first gauge moved, mm, frame by frame. */
export function gaugeDistance(traces: RunTraces | null): number[] {
  return traces?.gauges[0]?.displacement.map((d) => Math.hypot(...d) * 1000) ?? [];
}

export const gaugeTitle = (traces: RunTraces | null): string => {
  const gauge = traces?.gauges[0];
  return gauge ? `${gauge.id} ${gauge.name.toLowerCase()} moved, mm` : 'No gauge in this run';
};

/** Largest distance of the first gauge from rest over the run, mm. */
export const furthest = (traces: RunTraces): number => Math.max(0, ...gaugeDistance(traces));

/** Smallest J of the run; 1 where nothing was compressed. */
export const worstCompression = (traces: RunTraces): number => Math.min(1, ...traces.worstCompression);
