import type { SceneDocument } from '../../shared/scene-document';

/** Seconds of motion that are followed at most. */
const FOLLOWED = 2;
/** Finer parts have up to 2.5 times the count; work grows a little slower than its square. */
const FINER_WORK = 4.7;
const FINER_SET_UP = 1.5;
/** An exact step against a live one. */
const EXACT = 2;
/** s over parts²: a live step on a machine with two slow cores, when none has been measured here. */
const STEP = 1.2e-5;
/** Steps of a solution for the rest under load, in live steps. */
const REST_STEPS = 12;

/** About how long the comparison with finer parts takes, s. `rate` is the live steps a second measured here, if any. */
export function convergenceCost(
  { time, parts }: SceneDocument,
  { setUpSeconds, partCount, rate }: { setUpSeconds: number; partCount: number; rate: number | null },
): number {
  const step = rate === null ? STEP * Math.max(partCount, parts.count) ** 2 : 1 / rate;
  const steps =
    time.kind === 'static'
      ? REST_STEPS * time.loadSteps
      : EXACT * time.substeps * Math.min(time.frames, FOLLOWED * time.framesPerSecond);
  return setUpSeconds * (1 + FINER_SET_UP) + step * steps * (1 + FINER_WORK);
}
