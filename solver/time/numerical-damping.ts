import type { TimeMethod } from '../scene';
import { type Motion, type Stage, STAGES } from './stages';

/**
 * Share of the energy of an undamped oscillator of `hertz` that a method keeps in one second of steps of `dt` s:
 * the method's own formulas on x″ = −ω² x. For backward Euler it is (1 + ω²h²)^(−1/h) exactly.
 */
export function energyKept(method: TimeMethod, hertz: number, dt: number): number {
  const omega = 2 * Math.PI * hertz;
  const stiffness = omega * omega;
  const at = (x: number, v: number): Motion => ({
    x: Float64Array.of(x),
    v: Float64Array.of(v),
    a: Float64Array.of(-stiffness * x),
  });
  let now = at(1, 0);
  let before: Motion | null = null;
  const energy = ({ x, v }: Motion) => stiffness * x[0]! * x[0]! + v[0]! * v[0]!;
  // Energy of second-order methods swings within a period: compare means over the first and the last period.
  const period = Math.max(1, Math.round(1 / (hertz * dt)));
  const steps = Math.max(2 * period, Math.round(1 / dt));
  const energies: number[] = [];
  for (let n = 0; n < steps + period; n++) {
    energies.push(energy(now));
    let middle = now;
    for (const stage of STAGES[method]) middle = solve(stage({ dt, now, before, middle }), now, stiffness);
    before = now;
    now = middle;
  }
  const mean = (from: number) => {
    let sum = 0;
    for (let n = from; n < from + period; n++) sum += energies[n]!;
    return sum / period;
  };
  return (mean(steps) / mean(0)) ** (1 / (steps * dt));
}

function solve(stage: Stage, start: Motion, stiffness: number): Motion {
  const { inertia, predicted, slope, anchor, stiffness: weight } = stage;
  const x = (inertia * predicted[0]! - (1 - weight) * stiffness * start.x[0]!) / (inertia + weight * stiffness);
  return {
    x: Float64Array.of(x),
    v: Float64Array.of(slope * (x - anchor[0]!)),
    a: Float64Array.of(inertia * (x - predicted[0]!)),
  };
}
