import type {
  CheckRequest,
  CheckResponse,
  ConvergenceEstimate,
  Patch,
  ProofCheck,
  ProofResult,
  Scene,
} from '../../solver/index';

export interface CheckJob<T> {
  done: Promise<T>;
  /** Ends the worker; `done` then stays open. */
  stop: () => void;
}

export interface ProofAnswer {
  result: ProofResult;
  kernels: string;
  solverVersion: string;
}

/** One request to a worker of its own: it computes beside whatever else goes on, and can be stopped at any moment. */
function start<T>(
  request: CheckRequest,
  onProgress: (share: number) => void,
  take: (response: CheckResponse) => T | null,
): CheckJob<T> {
  const worker = new Worker(new URL('../../solver/cases/check.worker', import.meta.url));
  const done = new Promise<T>((resolve, reject) => {
    const end = (finish: () => void) => {
      worker.terminate();
      finish();
    };
    worker.onmessage = ({ data }: MessageEvent<CheckResponse>) => {
      if (data.type === 'progress') return onProgress(data.share);
      if (data.type === 'error') return end(() => reject(new Error(data.message)));
      const answer = take(data);
      if (answer !== null) end(() => resolve(answer));
    };
    worker.onerror = (event) => {
      event.preventDefault();
      end(() => reject(new Error('The solver broke off. Nothing was changed; start it again.')));
    };
  });
  worker.postMessage(request);
  return { done, stop: () => worker.terminate() };
}

export const computeProof = (check: ProofCheck, onProgress: (share: number) => void): CheckJob<ProofAnswer> =>
  start({ type: 'proof', check }, onProgress, (response) => (response.type === 'proof' ? response : null));

/** Patches in the scene's unit, as the model has them. */
export const computeEstimate = (
  scene: Scene,
  patches: Patch[],
  onProgress: (share: number) => void,
): CheckJob<ConvergenceEstimate> =>
  start({ type: 'estimate', scene, patches }, onProgress, (response) =>
    response.type === 'estimate' ? response.estimate : null,
  );
