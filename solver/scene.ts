/**
 * The scene as the solver reads it: plain data in SI units (m, kg, s, N, Pa), rest configuration.
 * `shared/scene-document.ts` holds the zod schema of the same document; a scene revision and a
 * command-line scene file are this structure.
 */

export type Vec3 = [number, number, number];
export type Axis = 'x' | 'y' | 'z';

/** Where something acts, on the rest surface. Lengths in metres, patch numbers count from 0. */
export type Region =
  | { kind: 'all' }
  /** Surface within `tolerance` of the plane through `point` with unit-free `normal`. */
  | { kind: 'plane'; point: Vec3; normal: Vec3; tolerance: number }
  | { kind: 'box'; min: Vec3; max: Vec3 }
  | { kind: 'sphere'; centre: Vec3; radius: number }
  | { kind: 'patches'; patches: number[] };

export type Shape =
  /** Six faces; `gap` shrinks every face towards its middle by this length, so nothing joins. */
  | { kind: 'box'; min: Vec3; max: Vec3; gap: number }
  | { kind: 'cylinder'; start: Vec3; end: Vec3; radius: number }
  | { kind: 'sphere'; centre: Vec3; radius: number }
  | { kind: 'torus'; centre: Vec3; axis: Vec3; majorRadius: number; minorRadius: number };

export type SceneGeometry =
  /** A model kept by the server. */
  | { kind: 'model'; modelId: string }
  /** A file beside the scene file (command line only). */
  | { kind: 'file'; path: string }
  /** Built-in shapes, lengths in the scene's `unit`. */
  | { kind: 'shapes'; shapes: Shape[] };

export type MaterialLaw = 'stable-neo-hookean' | 'neo-hookean-a' | 'neo-hookean-b';

export interface SceneMaterial {
  id: string;
  name: string;
  law: MaterialLaw;
  /** Young's modulus at small strain, Pa, > 0. */
  youngsModulus: number;
  /** Poisson's ratio, 0 ≤ nu < 0.5. */
  /** loss factor at `LOSS_HERTZ`, the share of stiffness that is viscous there; 0 when left out */
  loss?: number | undefined;
  poissonsRatio: number;
  /** kg/m³, > 0. */
  density: number;
  /** Patch numbers made of it; left out: every patch no other material claims. */
  patches?: number[];
  /** The library preset and version it came from, for provenance. */
  preset?: { id: string; version: number };
}

export interface SupportKey {
  /** s */
  time: number;
  /** m */
  translation: Vec3;
  /** Rotation vector (axis × angle) about the support's pivot, degrees. */
  rotationDegrees: Vec3;
}

export interface SceneSupport {
  id: string;
  name: string;
  region: Region;
  /** Directions that are held; the others are free. */
  axes: Axis[];
  /** Empty: fixed at rest. Otherwise carried; linear between keys, held outside their range. */
  keys: SupportKey[];
  /** Centre of rotation, m; left out: the region's area centroid. */
  pivot?: Vec3;
}

export type SceneLoad =
  | { id: string; name: string; kind: 'gravity'; acceleration: Vec3 }
  /** Dead traction on the rest area, Pa. */
  | { id: string; name: string; kind: 'traction'; region: Region; traction: Vec3 }
  /** Pressure that follows the surface, Pa, positive pushes inwards. */
  | { id: string; name: string; kind: 'pressure'; region: Region; pressure: number }
  /** A total force spread evenly over the region, N, acting from `from` until `until` (s). */
  | { id: string; name: string; kind: 'push'; region: Region; force: Vec3; from: number; until: number | null }
  /** A moment, N m, about `axis` through the middle of the region as it is in the step: tangential, without a net force. */
  | {
      id: string;
      name: string;
      kind: 'twist';
      region: Region;
      axis: Vec3;
      moment: number;
      from: number;
      until: number | null;
    }
  /** Mean wind, m/s; `dragCoefficient` scales the pressure ½ρ v² on the windward side. */
  | {
      id: string;
      name: string;
      kind: 'wind';
      velocity: Vec3;
      dragCoefficient: number;
      airDensity: number;
      /** left out: steady */
      gusts?: { factor: number; seconds: number; seed: number } | undefined;
    };

interface ObstacleBase {
  id: string;
  name: string;
  /** Coulomb coefficient. */
  friction: number;
}

/** What the body can rest on or hit; it stands still. Lengths in m. */
export type SceneObstacle =
  /** Everything below a height along the scene's `up`. */
  | (ObstacleBase & { kind: 'ground'; height: number })
  | (ObstacleBase & { kind: 'sphere'; centre: Vec3; radius: number })
  | (ObstacleBase & { kind: 'box'; min: Vec3; max: Vec3 });

export interface SceneGauge {
  id: string;
  name: string;
  /** Rest position, m; the nearest point of the surface is traced. */
  point: Vec3;
}

export type TimeMethod = 'backward-euler' | 'bdf2' | 'hht' | 'tr-bdf2';

export type SceneTime =
  | { kind: 'static'; loadSteps: number }
  | { kind: 'motion'; framesPerSecond: number; frames: number; substeps: number; method: TimeMethod };

export interface Scene {
  format: 'lollop-scene';
  version: 1;
  name: string;
  geometry: SceneGeometry;
  /** Metres per unit of the geometry. */
  unit: number;
  up: 'y' | 'z';
  parts: {
    count: number;
    order: 'quadratic' | 'linear';
  };
  /** Pieces closer than this are tied together, m; 0 ties nothing. */
  bondDistance: number;
  materials: SceneMaterial[];
  supports: SceneSupport[];
  loads: SceneLoad[];
  obstacles: SceneObstacle[];
  gauges: SceneGauge[];
  time: SceneTime;
}
