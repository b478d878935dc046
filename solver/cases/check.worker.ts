import type { Patch } from '../geometry/patch';
import { scalePatch } from '../geometry/transform';
import { bestKernels } from '../kernels/best-kernels';
import type { Scene } from '../scene';
import { estimateConvergence, type ConvergenceEstimate } from '../time/convergence';
import { SOLVER_VERSION } from '../version';
import type { ProofResult } from './proof/proof-result';
import { runProofCheck, type ProofCheck } from './proof/run-check';

/**
 * The web worker for what is computed once on demand: checks of the proof sheet, estimates of convergence. It answers
 * one request; whoever wants to stop it ends the worker.
 */
export type CheckRequest =
  | { type: 'proof'; check: ProofCheck }
  /** Patches in the scene's unit. */
  | { type: 'estimate'; scene: Scene; patches: Patch[] };

export type CheckResponse =
  | { type: 'progress'; share: number }
  | { type: 'proof'; result: ProofResult; kernels: string; solverVersion: string }
  | { type: 'estimate'; estimate: ConvergenceEstimate }
  | { type: 'error'; message: string };

interface WorkerScope {
  onmessage: ((event: { data: CheckRequest }) => void) | null;
  postMessage(message: CheckResponse): void;
}
const scope = self as unknown as WorkerScope;

scope.onmessage = ({ data }) => {
  const kernels = bestKernels();
  let told = 0;
  const onProgress = (share: number) => {
    if (share < 1 && share - told < 0.02) return;
    told = share;
    scope.postMessage({ type: 'progress', share });
  };
  try {
    if (data.type === 'proof') {
      const result = runProofCheck(data.check, kernels, onProgress);
      scope.postMessage({ type: 'proof', result, kernels: kernels.name, solverVersion: SOLVER_VERSION });
    } else {
      const estimate = estimateConvergence(
        data.scene,
        data.patches.map((patch) => scalePatch(patch, data.scene.unit)),
        kernels,
        onProgress,
      );
      scope.postMessage({ type: 'estimate', estimate });
    }
  } catch (error) {
    const known = error instanceof RangeError || (error instanceof Error && error.name === 'SolverStopped');
    scope.postMessage({
      type: 'error',
      message: known
        ? (error as Error).message
        : `The solver met a fault of its own (${error instanceof Error ? error.message : String(error)}). Nothing was changed.`,
    });
  }
};
