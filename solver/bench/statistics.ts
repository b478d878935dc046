export const round = (x: number): number => Number(x.toPrecision(3));

/** Median milliseconds of one call, after two that are not counted. */
export function milliseconds(work: () => void, times = 9): number {
  work();
  work();
  const taken = Array.from({ length: times }, () => {
    const begin = performance.now();
    work();
    return performance.now() - begin;
  });
  return taken.sort((a, b) => a - b)[times >> 1]!;
}
