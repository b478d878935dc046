import { useQueryClient } from '@tanstack/react-query';
import { router } from 'expo-router';
import { inflateSync } from 'fflate';
import { useRef, useState } from 'react';
import type { Run } from '../../shared/wire/runs';
import type { SceneDocument } from '../../shared/scene-document';
import type { Ready } from '../../solver/index';
import { api } from '../api/client';
import type { SolverClient, SolverEvents } from '../solver-client/solver-client';
import { BakeUpload, startRun } from './bake-upload';

export interface BakeState {
  run: Run;
  pose: number;
  poses: number;
  secondsLeft: number;
  waiting: boolean;
  sending: boolean;
}

/** Baking from the workbench: start, go on, stop; chunks are sent as they come. */
export function useBake(
  sceneId: string,
  client: React.RefObject<SolverClient | null>,
  events: React.RefObject<SolverEvents>,
) {
  const queries = useQueryClient();
  const [bake, setBake] = useState<BakeState | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const upload = useRef<BakeUpload | null>(null);
  const change = (part: Partial<BakeState>) => setBake((now) => now && { ...now, ...part });

  const follow = (sender: BakeUpload) => {
    upload.current = sender;
    const fail = (message: string) => {
      sender.stop();
      client.current?.stopBake();
      setBake(null);
      setFault(message);
      void queries.invalidateQueries({ queryKey: ['runs'] });
    };
    events.current = {
      onChunk: (chunk) => sender.add(chunk),
      onBakeProgress: ({ pose, poses, secondsLeft }) => change({ pose, poses, secondsLeft }),
      onBaked: () => {
        change({ sending: true });
        sender.finish().then(
          (done) => {
            setBake(null);
            void queries.invalidateQueries({ queryKey: ['runs'] });
            router.push(`/runs/${done.id}`);
          },
          (error: Error) => fail(error.message),
        );
      },
      onBakeStopped: () => undefined,
      onError: (message) => fail(message),
    };
  };
  const sender = (run: Run) =>
    new BakeUpload(
      api,
      run,
      (waiting) => change({ waiting }),
      (message) => events.current.onError?.(message, 'bake'),
    );

  return {
    bake,
    fault,
    /** Bakes a saved revision from rest. */
    start: async (revisionId: string, document: SceneDocument, ready: Ready) => {
      setFault(null);
      try {
        const run = await startRun(api, sceneId, revisionId, document, ready);
        setBake({ run, pose: 0, poses: run.frames + 1, secondsLeft: 0, waiting: false, sending: false });
        follow(sender(run));
        client.current?.bake(null);
      } catch (error) {
        setFault((error as Error).message);
      }
    },
    /** Goes on with an unfinished run of the revision that is open. */
    resume: async (run: Run) => {
      setFault(null);
      try {
        const sending = sender(run);
        const from = await sending.resume(inflateSync);
        setBake({ run, pose: from?.pose ?? 0, poses: run.frames + 1, secondsLeft: 0, waiting: false, sending: false });
        follow(sending);
        client.current?.bake(from);
      } catch (error) {
        setFault((error as Error).message);
      }
    },
    /** Stops; what was sent stays and can be gone on with. */
    stop: () => {
      upload.current?.stop();
      client.current?.stopBake();
      setBake(null);
      void queries.invalidateQueries({ queryKey: ['runs'] });
    },
  };
}

export type Bake = ReturnType<typeof useBake>;
