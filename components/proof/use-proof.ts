import { useEffect, useRef, useState } from 'react';
import type { ProofCheck } from '../../solver/index';
import { computeProof, type CheckJob, type ProofAnswer } from '../solver-client/check-client';
import { CHECKS } from './checks';

export type CheckState =
  | { state: 'waiting' }
  | { state: 'running'; share: number }
  | { state: 'stopped' }
  | { state: 'failed'; message: string }
  | { state: 'done'; answer: ProofAnswer; seconds: number };

export type CheckStates = Record<ProofCheck, CheckState>;

const every = (state: CheckState): CheckStates =>
  Object.fromEntries(CHECKS.map(({ id }) => [id, state])) as unknown as CheckStates;

/** The checks computed one after another, each in a worker of its own, until done or stopped. */
export function useProof() {
  const [checks, setChecks] = useState<CheckStates>(() => every({ state: 'waiting' }));
  const [running, setRunning] = useState(false);
  const job = useRef<CheckJob<ProofAnswer> | null>(null);
  const turn = useRef(0);

  const set = (id: ProofCheck, state: CheckState) => setChecks((before) => ({ ...before, [id]: state }));

  const run = async () => {
    const mine = ++turn.current;
    setChecks(every({ state: 'waiting' }));
    setRunning(true);
    for (const { id } of CHECKS) {
      set(id, { state: 'running', share: 0 });
      const begin = performance.now();
      try {
        job.current = computeProof(id, (share) => set(id, { state: 'running', share }));
        const answer = await job.current.done;
        set(id, { state: 'done', answer, seconds: (performance.now() - begin) / 1000 });
      } catch (error) {
        set(id, { state: 'failed', message: (error as Error).message });
      }
      if (turn.current !== mine) return;
    }
    setRunning(false);
  };

  const stop = () => {
    turn.current++;
    job.current?.stop();
    setRunning(false);
    setChecks(
      (before) =>
        Object.fromEntries(
          Object.entries(before).map(([id, check]) => [
            id,
            check.state === 'running' || check.state === 'waiting' ? { state: 'stopped' } : check,
          ]),
        ) as unknown as CheckStates,
    );
  };

  useEffect(() => {
    const end = () => {
      turn.current++;
      job.current?.stop();
    };
    return end;
  }, []);

  return { checks, running, run: () => void run(), stop };
}
