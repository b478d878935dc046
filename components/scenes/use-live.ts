import { useEffect, useRef, useState } from 'react';
import type { SceneDocument } from '../../shared/scene-document';
import type { LiveFrame, LiveSpeed, Patch, Ready } from '../../solver/index';
import { bodyName, SolverClient, type SolverEvents } from '../solver-client/solver-client';
import { PoseSource } from '../stage/pose-source';
import { stageModule } from '../stage/stage-module';

/** Samples kept for the traces along the bottom. */
const TRACE_LENGTH = 400;
/** Readouts are redrawn this often at most; the body moves with every frame. */
const READOUT_MILLISECONDS = 120;

export interface LiveTraces {
  energy: number[];
  volume: number[];
  compression: number[];
  gauge: number[];
}

const EMPTY: LiveTraces = { energy: [], volume: [], compression: [], gauge: [] };

/** The solver at work on a document: what it says, and what it can be told. */
export function useLive(
  document: SceneDocument,
  patches: Patch[],
  up: 'y' | 'z',
  bakeEvents: React.RefObject<SolverEvents>,
  moveAtOnce: boolean,
) {
  const [pose] = useState(() => new PoseSource());
  const client = useRef<SolverClient | null>(null);
  const [ready, setReady] = useState<Ready | null>(null);
  const [frame, setFrame] = useState<LiveFrame | null>(null);
  const [progress, setProgress] = useState<string | null>('Reading the body');
  const [message, setMessage] = useState<{ text: string; fault: boolean } | null>(null);
  const [playing, setPlaying] = useState<LiveSpeed | null>(null);
  const traces = useRef<LiveTraces>(structuredClone(EMPTY));
  const latest = useRef({ document, up, moveAtOnce });
  const sent = useRef<SceneDocument | null>(null);

  useEffect(() => {
    latest.current = { document, up, moveAtOnce };
  });

  useEffect(() => {
    let drawn = 0;
    let first = true;
    const show = (next: LiveFrame) => {
      pose.set(next.coefficients);
      const t = traces.current;
      const { readouts } = next;
      const gauge = readouts.gauges[0]?.displacement ?? [0, 0, 0];
      push(t.energy, readouts.kinetic + readouts.elastic);
      push(t.volume, readouts.volumeChange * 100);
      push(t.compression, readouts.worstCompression);
      push(t.gauge, Math.hypot(...gauge) * 1000);
      const now = performance.now();
      if (now - drawn < READOUT_MILLISECONDS && next.stepsPerSecond !== null) return;
      drawn = now;
      setFrame(next);
    };
    const solver = new SolverClient({
      onProgress: (stage) => setProgress(stage),
      onReady: (next, at, remark) => {
        setProgress(null);
        setReady(next);
        pose.set(at.coefficients);
        setFrame(at);
        if (first && latest.current.moveAtOnce) {
          setPlaying('real-time');
          solver.play('real-time');
        }
        first = false;
        if (remark) setMessage({ text: remark, fault: false });
      },
      onFrame: show,
      onPaused: () => setPlaying(null),
      onError: (text, during) => {
        setProgress(null);
        setPlaying(null);
        setMessage({ text, fault: true });
        if (during === 'bake') bakeEvents.current.onError?.(text, during);
      },
      onChunk: (chunk) => bakeEvents.current.onChunk?.(chunk),
      onBakeProgress: (next) => {
        pose.set(next.coefficients);
        bakeEvents.current.onBakeProgress?.(next);
      },
      onBaked: () => bakeEvents.current.onBaked?.(),
      onBakeStopped: (at) => bakeEvents.current.onBakeStopped?.(at),
    });
    let left = false;
    stageModule().then(
      ({ scalePatch }) => {
        if (left) return;
        // What was changed meanwhile is opened with it.
        const scene = latest.current.document;
        client.current = solver;
        sent.current = scene;
        solver.open({
          body: bodyName(scene),
          scene,
          patches: patches.map((patch) => scalePatch(patch, scene.unit)),
        });
      },
      () =>
        setMessage({ text: 'The stage could not be fetched. Load the page again; the scene is kept.', fault: true }),
    );
    return () => {
      left = true;
      solver.close();
    };
  }, [patches, pose, bakeEvents]);

  // A changed document reaches the solver at once; a changed part count waits until the slider rests.
  useEffect(() => {
    if (sent.current === document || !client.current) return;
    const geometric = sent.current?.parts !== document.parts || sent.current?.bondDistance !== document.bondDistance;
    const timer = setTimeout(
      () => {
        sent.current = document;
        if (geometric) setProgress('Fitting the parts');
        setMessage(null);
        client.current?.setScene(document);
      },
      geometric ? 350 : 40,
    );
    return () => clearTimeout(timer);
  }, [document]);

  return {
    pose,
    ready,
    frame,
    progress,
    message,
    dismiss: () => setMessage(null),
    playing,
    traces: traces.current,
    client,
    play: (speed: LiveSpeed) => {
      setMessage(null);
      setPlaying(speed);
      client.current?.play(speed);
    },
    pause: () => {
      setPlaying(null);
      client.current?.pause();
    },
    step: () => {
      setPlaying(null);
      client.current?.step();
    },
    rest: () => {
      traces.current = structuredClone(EMPTY);
      client.current?.rest();
    },
  };
}

export type Live = ReturnType<typeof useLive>;

/** Rounding at rest is no reading: it would fill the trace's axis with noise. */
const NOISE = 1e-9;

function push(list: number[], value: number): void {
  list.push(Math.abs(value) < NOISE ? 0 : value);
  if (list.length > TRACE_LENGTH) list.shift();
}
