/** Times the stages of set-up for the report; results never depend on it. */
export class StageClock {
  readonly stages: { name: string; seconds: number }[] = [];
  private readonly begin = performance.now();
  private last = this.begin;

  constructor(private readonly onProgress?: (stage: string, share: number) => void) {}

  /** Ends the running stage under this name; `share` of the whole work is done. */
  mark(name: string, share: number): void {
    const now = performance.now();
    this.stages.push({ name, seconds: (now - this.last) / 1000 });
    this.last = now;
    this.onProgress?.(name, share);
  }

  get seconds(): number {
    return (performance.now() - this.begin) / 1000;
  }
}
