/** Pairs of steps and gradient changes kept; more add work and little speed. */
const MEMORY = 6;

/**
 * Directions of the limited-memory BFGS method (Nocedal and Wright 2006, alg. 7.4) around an approximate inverse
 * Hessian: the factor of an earlier pose, corrected by what the steps since then have shown.
 */
export class QuasiNewton {
  private readonly steps: Float64Array[] = [];
  private readonly changes: Float64Array[] = [];
  private readonly inverses: number[] = [];

  /** Forgets all pairs: the factor is new. */
  clear(): void {
    this.steps.length = 0;
    this.changes.length = 0;
    this.inverses.length = 0;
  }

  /** Takes in a step and the change of the gradient along it. */
  learn(step: Float64Array, change: Float64Array): void {
    const curvature = dot(step, change);
    // The energy curves the wrong way along this step: it says nothing about the minimum.
    if (!(curvature > 1e-12 * Math.sqrt(dot(step, step) * dot(change, change)))) return;
    this.steps.push(step);
    this.changes.push(change);
    this.inverses.push(1 / curvature);
    if (this.steps.length > MEMORY) {
      this.steps.shift();
      this.changes.shift();
      this.inverses.shift();
    }
  }

  /** x ← the corrected inverse Hessian times x; `solve` is the inverse that is corrected, in place. */
  direct(x: Float64Array, solve: (x: Float64Array) => void): void {
    const { steps, changes, inverses } = this;
    const shares = new Float64Array(steps.length);
    for (let k = steps.length - 1; k >= 0; k--) {
      shares[k] = inverses[k]! * dot(steps[k]!, x);
      add(x, changes[k]!, -shares[k]!);
    }
    solve(x);
    for (let k = 0; k < steps.length; k++) {
      add(x, steps[k]!, shares[k]! - inverses[k]! * dot(changes[k]!, x));
    }
  }
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let u = 0; u < a.length; u++) sum += a[u]! * b[u]!;
  return sum;
}

function add(x: Float64Array, y: Float64Array, factor: number): void {
  for (let u = 0; u < x.length; u++) x[u]! += factor * y[u]!;
}
