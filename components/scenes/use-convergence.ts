import { useEffect, useRef, useState } from 'react';
import type { SceneDocument } from '../../shared/scene-document';
import type { ConvergenceEstimate, Patch } from '../../solver/index';
import { computeEstimate, type CheckJob } from '../solver-client/check-client';

type State =
  | { state: 'none' }
  | { state: 'running'; share: number }
  | { state: 'failed'; message: string }
  | { state: 'done'; estimate: ConvergenceEstimate };

/** The comparison of a scene with finer parts, on demand, beside whatever the bench does; it holds for one document. */
export function useConvergence(document: SceneDocument, patches: Patch[]) {
  const [found, setFound] = useState<{ of: SceneDocument; is: State } | null>(null);
  const job = useRef<CheckJob<ConvergenceEstimate> | null>(null);

  // What is changed meanwhile makes the answer one about another scene.
  useEffect(() => () => job.current?.stop(), [document, patches]);

  const start = async () => {
    const set = (is: State) => setFound({ of: document, is });
    set({ state: 'running', share: 0 });
    try {
      job.current = computeEstimate(document, patches, (share) => set({ state: 'running', share }));
      set({ state: 'done', estimate: await job.current.done });
    } catch (error) {
      set({ state: 'failed', message: (error as Error).message });
    }
  };
  const stop = () => {
    job.current?.stop();
    setFound(null);
  };
  const shown: State = found?.of === document ? found.is : { state: 'none' };
  return { shown, start: () => void start(), stop };
}

export type Convergence = ReturnType<typeof useConvergence>;
