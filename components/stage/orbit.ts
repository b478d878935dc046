import type { Vec3 } from '../../solver/index';

/** Where the camera stands: angles in radians about the upward axis, distances in metres. */
export interface Orbit {
  azimuth: number;
  elevation: number;
  distance: number;
  target: Vec3;
}

export const VERTICAL_FIELD_DEGREES = 22;
const START_ELEVATION = (12 * Math.PI) / 180;
const START_AZIMUTH = (-62 * Math.PI) / 180;
const LIMIT = Math.PI / 2 - 0.01;

/** Named directions of view, in the words of the buttons. */
export const VIEWS = { Front: -Math.PI / 2, Side: 0, Top: null } as const;
export type ViewName = keyof typeof VIEWS;

/** A camera that several stages may share; they redraw when it moves. */
export class OrbitCamera {
  orbit: Orbit = { azimuth: START_AZIMUTH, elevation: START_ELEVATION, distance: 1, target: [0, 0, 0] };
  private home: Orbit = this.orbit;
  private framed = false;
  private readonly listeners = new Set<() => void>();

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  /** Frames a body the first time it is called; later bodies keep the view unless `again`. */
  frame(min: Vec3, max: Vec3, aspect: number, again = false): void {
    if (this.framed && !again) return;
    this.framed = true;
    const target = min.map((x, d) => (x + max[d]!) / 2) as Vec3;
    const radius = Math.hypot(max[0] - min[0], max[1] - min[1], max[2] - min[2]) / 2;
    const half = Math.tan((VERTICAL_FIELD_DEGREES * Math.PI) / 360);
    const narrow = Math.min(1, Math.max(0.45, aspect));
    this.home = {
      azimuth: START_AZIMUTH,
      elevation: START_ELEVATION,
      distance: (1.14 * radius) / (half * narrow),
      target,
    };
    this.set(this.home);
  }

  turn(byAzimuth: number, byElevation: number): void {
    const { azimuth, elevation } = this.orbit;
    this.set({
      ...this.orbit,
      azimuth: azimuth - byAzimuth,
      elevation: Math.max(-LIMIT, Math.min(LIMIT, elevation + byElevation)),
    });
  }

  zoom(factor: number): void {
    const distance = Math.max(this.home.distance / 20, Math.min(this.home.distance * 8, this.orbit.distance * factor));
    this.set({ ...this.orbit, distance });
  }

  view(name: ViewName): void {
    const azimuth = VIEWS[name];
    this.set({ ...this.home, azimuth: azimuth ?? this.home.azimuth, elevation: azimuth === null ? LIMIT : 0 });
  }

  backHome(): void {
    this.set(this.home);
  }

  private set(orbit: Orbit): void {
    this.orbit = orbit;
    for (const listener of this.listeners) listener();
  }
}
