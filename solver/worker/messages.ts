import type { Patch } from '../geometry/patch';
import type { SetupReport, SurfaceMap } from '../quadrature/prepared';
import type { Scene, Vec3 } from '../scene';
import type { Readouts } from '../time/readouts';

/** How fast the live view runs against the clock. */
export type LiveSpeed = 'slow' | 'real-time' | 'flat-out';

/** To the worker. */
export type Request =
  /** Patches in metres; `body` names them, so that a body prepared ahead is known again. */
  | { type: 'open'; body: string; scene: Scene; patches: Patch[] }
  /** Set a body up before its scene is asked for: nothing is answered, a fault is met again when it is opened. */
  | { type: 'prepare-ahead'; body: string; scene: Scene; patches: Patch[] }
  | { type: 'scene'; scene: Scene }
  | { type: 'play'; speed: LiveSpeed }
  | { type: 'pause' }
  | { type: 'step' }
  | { type: 'rest' }
  /** Pull the surface sample nearest to a rest place towards a target (m), or let go. */
  | { type: 'pull'; pull: { rest: Vec3; target: Vec3 } | null }
  /** Bake the open scene's frames from rest, or go on from a kept state at pose `from.pose`. */
  | { type: 'bake'; from: { pose: number; state: Float64Array } | null }
  | { type: 'stop-bake' };

/** What the screen needs of a prepared scene. */
export interface Ready {
  surface: SurfaceMap;
  report: SetupReport;
  partCount: number;
  basis: 4 | 10;
  bodies: { material: number; partCount: number; volume: number }[];
  /** kg */
  mass: number;
  kernels: string;
  solverVersion: string;
  /** how coefficients become the surface, kept with a run */
  recipe: Uint8Array;
}

export interface LiveFrame {
  coefficients: Float64Array;
  /** s since rest */
  time: number;
  readouts: Readouts;
  /** averaged over the last half second; null while paused */
  stepsPerSecond: number | null;
}

/** One kept trace value set a pose. */
export interface PoseTrace {
  gauges: { id: string; name: string; displacement: Vec3 }[];
  energy: number;
  volumeChange: number;
  worstCompression: number;
}

/** From the worker. */
export type Response =
  | { type: 'progress'; stage: string; share: number }
  | { type: 'ready'; ready: Ready; frame: LiveFrame; remark: string | null }
  | { type: 'frame'; frame: LiveFrame }
  | { type: 'paused' }
  /** `state` is what a later bake can go on from: the pose after the chunk's last. */
  | { type: 'chunk'; index: number; bytes: Uint8Array; traces: PoseTrace[]; pose: number; state: Float64Array }
  | { type: 'bake-progress'; pose: number; poses: number; coefficients: Float64Array; secondsLeft: number }
  | { type: 'baked' }
  | { type: 'bake-stopped'; pose: number }
  | { type: 'error'; message: string; during: 'open' | 'scene' | 'live' | 'bake' };
