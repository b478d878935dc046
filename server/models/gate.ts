/** Lets a fixed number of tasks run at once; the others wait in the order they came. */
export class Gate {
  private running = 0;
  private readonly waiting: (() => void)[] = [];

  constructor(private readonly most: number) {}

  async pass<T>(task: () => Promise<T>): Promise<T> {
    if (this.running >= this.most) await new Promise<void>((resolve) => this.waiting.push(resolve));
    else this.running += 1;
    try {
      return await task();
    } finally {
      // Hand the place on without giving it back, so that nobody slips in between.
      const next = this.waiting.shift();
      if (next) next();
      else this.running -= 1;
    }
  }
}
