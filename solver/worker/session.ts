import { encodeChunk, quantumFor } from '../frames/frame-store';
import type { Patch } from '../geometry/patch';
import type { Kernels } from '../kernels/kernels';
import { prepare } from '../quadrature/prepare';
import type { BasisRows, Prepared } from '../quadrature/prepared';
import { refit } from '../quadrature/refit';
import { surfaceRecipe } from '../quadrature/surface-recipe';
import type { Scene, Vec3 } from '../scene';
import { Simulation } from '../time/simulation';
import { SOLVER_VERSION } from '../version';
import type { LiveFrame, PoseTrace, Ready, Request, Response } from './messages';

/** Poses a chunk; must be the wire's. */
export const POSES_PER_CHUNK = 24;
/** A frame of a run is kept to this share of the model's diagonal. */
const FRAME_BOUND = 2e-5;

/**
 * What the worker does, without a worker: one scene, prepared, stepped and baked. `send` gets every response. The
 * caller decides when to call `tick`.
 */
export class SolverSession {
  private scene: Scene | null = null;
  private patches: Patch[] = [];
  private prepared: Prepared | null = null;
  private simulation: Simulation | null = null;
  private readonly rates: number[] = [];
  private lastSent = 0;
  playing: { scale: number } | null = null;
  private bake: Bake | null = null;
  private ahead: { key: string; prepared: Prepared } | null = null;

  constructor(
    private readonly kernels: Kernels,
    private readonly send: (response: Response, transfer?: ArrayBufferLike[]) => void,
    private readonly now: () => number,
  ) {}

  /** Whether `tick` has work to do. */
  get busy(): boolean {
    return this.playing !== null || this.bake !== null;
  }

  handle(request: Request): void {
    const during =
      request.type === 'open' ? 'open' : request.type === 'scene' ? 'scene' : request.type === 'bake' ? 'bake' : 'live';
    try {
      this.act(request);
    } catch (error) {
      if (request.type !== 'prepare-ahead') this.fail(error, during);
    }
  }

  private act(request: Request): void {
    switch (request.type) {
      case 'open':
        this.playing = null;
        this.patches = request.patches;
        this.open(request.scene, false, aheadKey(request));
        return;
      case 'prepare-ahead':
        this.ahead = { key: aheadKey(request), prepared: prepare(request.scene, request.patches) };
        return;
      case 'scene':
        this.change(request.scene);
        return;
      case 'play':
        this.playing = { scale: request.speed === 'slow' ? 0.25 : request.speed === 'real-time' ? 1 : Infinity };
        this.rates.length = 0;
        return;
      case 'pause':
        this.playing = null;
        this.send({ type: 'paused' });
        this.sendFrame();
        return;
      case 'step':
        this.playing = null;
        this.need().step();
        this.sendFrame();
        return;
      case 'rest':
        this.need().reset();
        this.sendFrame();
        return;
      case 'pull':
        this.pull(request.pull);
        return;
      case 'bake':
        this.playing = null;
        this.bake = new Bake(this.prepared!, this.scene!, this.kernels, request.from, this.now());
        return;
      case 'stop-bake':
        if (this.bake) {
          this.send({ type: 'bake-stopped', pose: this.bake.pose });
          this.bake = null;
        }
    }
  }

  private need(): Simulation {
    if (!this.simulation) throw new Error('No scene is open yet. Open one first.');
    return this.simulation;
  }

  private open(scene: Scene, keepPose: boolean, key?: string): void {
    const from = keepPose ? { prepared: this.prepared!, simulation: this.simulation! } : null;
    const prepared =
      key && this.ahead?.key === key
        ? this.ahead.prepared
        : prepare(scene, this.patches, (stage, share) => this.send({ type: 'progress', stage, share }));
    this.ahead = null;
    const simulation = new Simulation(prepared, scene, this.kernels);
    let remark: string | null = null;
    if (from) {
      const pose = refit(from.prepared, from.simulation.coefficients, prepared);
      // Velocities are carried like a displacement: refit is linear in what it carries.
      const velocity = refit(from.prepared, from.simulation.velocity, prepared);
      simulation.adopt(pose, velocity, from.simulation.time);
      if (prepared.parts.count < from.prepared.parts.count)
        remark = 'Fewer parts hold less detail. The pose was kept as well as they can.';
    }
    this.scene = scene;
    this.prepared = prepared;
    this.simulation = simulation;
    const ready: Ready = {
      surface: prepared.surface,
      report: prepared.report,
      partCount: prepared.parts.count,
      basis: prepared.parts.basis,
      bodies: prepared.bodies.map(({ material, partCount, volume }) => ({ material, partCount, volume })),
      mass: prepared.bodies.reduce((sum, body) => sum + body.volume * scene.materials[body.material]!.density, 0),
      kernels: this.kernels.name,
      solverVersion: SOLVER_VERSION,
      recipe: surfaceRecipe(prepared),
    };
    this.send({ type: 'ready', ready, frame: this.frame(null), remark });
  }

  /** A change that touches only materials, loads, supports and time goes on; anything geometric refits. */
  private change(scene: Scene): void {
    const before = this.scene;
    if (!before || !this.simulation) throw new Error('No scene is open yet. Open one first.');
    if (geometryKey(before) === geometryKey(scene)) {
      this.simulation.update(scene);
      this.scene = scene;
      if (!this.playing) this.sendFrame();
    } else {
      this.open(scene, true);
    }
  }

  private pull(pull: { rest: Vec3; target: Vec3 } | null): void {
    const { samples } = this.prepared!;
    if (!pull) return this.need().setPull(null);
    let best = 0;
    let least = Infinity;
    for (let s = 0; s < samples.count; s++) {
      let d = 0;
      for (let k = 0; k < 3; k++) d += (samples.positions[3 * s + k]! - pull.rest[k]!) ** 2;
      if (d < least) {
        least = d;
        best = s;
      }
    }
    this.need().setPull({ sample: best, target: pull.target });
  }

  /** Does a slice of work (about 12 ms or one step). Returns how long the caller may wait before the next, ms. */
  tick(): number {
    if (this.bake) return this.tickBake(this.bake);
    if (!this.playing) return Infinity;
    const { time } = this.scene!;
    if (time.kind !== 'motion') {
      this.playing = null;
      this.solveRest();
      return Infinity;
    }
    const dt = 1 / (time.framesPerSecond * time.substeps);
    const begin = this.now();
    try {
      this.need().step();
    } catch (error) {
      this.playing = null;
      this.fail(error, 'live');
      return Infinity;
    }
    const end = this.now();
    this.rates.push(end);
    while (this.rates.length > 2 && end - this.rates[0]! > 500) this.rates.shift();
    if (end - this.lastSent >= 33) this.sendFrame();
    if (this.playing.scale === Infinity) return 0;
    // What is left of the step's own time; a solver slower than the clock does not wait at all.
    return Math.max(0, (dt * 1000) / this.playing.scale - (end - begin));
  }

  private solveRest(): void {
    try {
      const { time } = this.scene!;
      this.need().solveStatic(time.kind === 'static' ? time.loadSteps : 1, (share) =>
        this.send({ type: 'progress', stage: 'rest under load', share }),
      );
    } catch (error) {
      this.fail(error, 'live');
    }
    this.sendFrame();
    this.send({ type: 'paused' });
  }

  private tickBake(bake: Bake): number {
    try {
      const { chunk, done } = bake.next();
      if (chunk) this.send({ type: 'chunk', ...chunk }, [chunk.bytes.buffer]);
      this.send({
        type: 'bake-progress',
        pose: bake.pose,
        poses: bake.poses,
        coefficients: bake.coefficients.slice(),
        secondsLeft: bake.secondsLeft(this.now()),
      });
      if (done) {
        this.bake = null;
        this.send({ type: 'baked' });
      }
    } catch (error) {
      this.bake = null;
      this.fail(error, 'bake');
    }
    return 0;
  }

  private frame(stepsPerSecond: number | null): LiveFrame {
    const simulation = this.need();
    return {
      coefficients: simulation.coefficients.slice(),
      time: simulation.time,
      readouts: simulation.readouts(),
      stepsPerSecond,
    };
  }

  private sendFrame(): void {
    this.lastSent = this.now();
    const span = this.rates.length > 1 ? this.rates[this.rates.length - 1]! - this.rates[0]! : 0;
    const rate = this.playing && span > 0 ? ((this.rates.length - 1) * 1000) / span : null;
    this.send({ type: 'frame', frame: this.frame(rate) });
  }

  private fail(error: unknown, during: 'open' | 'scene' | 'live' | 'bake'): void {
    // Sentences for people come as RangeError (a scene that does not fit) and SolverStopped; anything else is a fault.
    const known = error instanceof RangeError || (error instanceof Error && error.name === 'SolverStopped');
    const message = known
      ? (error as Error).message
      : `The solver met a fault of its own (${error instanceof Error ? error.message : String(error)}). The scene is kept; go back to rest or reload the page.`;
    this.send({ type: 'error', message, during });
    if (this.simulation) this.sendFrame();
  }
}

/** What a scene's set-up depends on; a change of anything else goes on without it. */
function geometryKey(scene: Scene): string {
  return JSON.stringify([
    scene.geometry,
    scene.unit,
    scene.parts,
    scene.bondDistance,
    scene.materials.map((material) => [material.id, material.patches ?? null]),
  ]);
}

function aheadKey({ body, scene }: { body: string; scene: Scene }): string {
  return body + geometryKey(scene);
}

/** A bake in progress: from rest, frame by frame, every step exact so that the same scene gives the same bytes. */
class Bake {
  readonly poses: number;
  pose = 0;
  private readonly simulation: Simulation;
  private readonly quantum: number;
  private waiting: Float64Array[] = [];
  private traces: PoseTrace[] = [];
  private readonly began: { pose: number; at: number };
  private readonly substeps: number;

  constructor(
    prepared: Prepared,
    scene: Scene,
    kernels: Kernels,
    from: { pose: number; state: Float64Array } | null,
    now: number,
  ) {
    if (scene.time.kind !== 'motion') throw new RangeError('Only motion can be baked. Choose motion under Time.');
    this.poses = scene.time.frames + 1;
    this.substeps = scene.time.substeps;
    this.simulation = new Simulation(prepared, scene, kernels);
    this.quantum = quantumFor(FRAME_BOUND * prepared.report.diagonal, largestRow(prepared.surface.rows));
    if (from) {
      if (from.pose % POSES_PER_CHUNK !== 0 || from.pose >= this.poses)
        throw new RangeError(`A bake cannot go on from pose ${from.pose}.`);
      this.simulation.restoreState(from.state);
      this.pose = from.pose;
    }
    this.began = { pose: this.pose, at: now };
  }

  get coefficients(): Float64Array {
    return this.simulation.coefficients;
  }

  secondsLeft(now: number): number {
    const done = this.pose - this.began.pose;
    return done > 0 ? ((now - this.began.at) / 1000 / done) * (this.poses - this.pose) : 0;
  }

  /** Keeps the present pose and steps to the next; a full or last chunk comes back encoded. */
  next(): {
    chunk: { index: number; bytes: Uint8Array; traces: PoseTrace[]; pose: number; state: Float64Array } | null;
    done: boolean;
  } {
    this.waiting.push(this.coefficients.slice());
    this.traces.push(this.trace());
    this.pose++;
    const done = this.pose === this.poses;
    if (!done) for (let s = 0; s < this.substeps; s++) this.simulation.step({ exact: true, fresh: s === 0 });
    if (this.waiting.length < POSES_PER_CHUNK && !done) return { chunk: null, done };
    const first = this.pose - this.waiting.length;
    const bytes = encodeChunk(this.waiting, first, { mode: 'quantised', quantum: this.quantum });
    const chunk = {
      index: first / POSES_PER_CHUNK,
      bytes,
      traces: this.traces,
      pose: this.pose,
      state: this.simulation.saveState(),
    };
    this.waiting = [];
    this.traces = [];
    return { chunk, done };
  }

  private trace(): PoseTrace {
    const { gauges, kinetic, elastic, volumeChange, worstCompression } = this.simulation.readouts();
    return {
      gauges: gauges.map(({ id, name, displacement }) => ({ id, name, displacement })),
      energy: kinetic + elastic,
      volumeChange,
      worstCompression,
    };
  }
}

function largestRow(rows: BasisRows): number {
  let largest = 0;
  for (let r = 0; r < rows.count; r++) {
    let sum = 0;
    for (let v = rows.offsets[r]! * rows.basis; v < rows.offsets[r + 1]! * rows.basis; v++)
      sum += Math.abs(rows.values[v]!);
    largest = Math.max(largest, sum);
  }
  return largest;
}
