/** The latest pose of a body, handed to the stage without going through React. */
export class PoseSource {
  coefficients: Float64Array | null = null;
  private readonly listeners = new Set<() => void>();

  set(coefficients: Float64Array | null): void {
    this.coefficients = coefficients;
    for (const listener of this.listeners) listener();
  }

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }
}
