import type { Patch } from '../geometry/patch';

/**
 * What set-up makes of a scene's geometry, and all that the mechanics needs of it. Everything is
 * plain data (typed arrays, numbers, strings), so it can be posted to and from a worker.
 *
 * Numbering: parts 0 … partCount−1; a part has `basis` scalar functions (10 quadratic, 4 linear)
 *   p = {1, ξ, η, ζ, ξ², η², ζ², ξη, ηζ, ζξ},  (ξ,η,ζ) = (X − X_i)/h_i
 * Coefficients: c[(part · 3 + component) · basis + a], one flat Float64Array of length partCount·3·basis.
 * Position:  x(X) = Σ_i w_i(X) Σ_a p_a c_ia ;  N_ia = w_i p_a.
 */

export interface Parts {
  count: number;
  basis: 4 | 10;
  /** 3 · count, m, rest */
  centres: Float64Array;
  /** count, m: scaling h_i of the polynomial's argument */
  scales: Float64Array;
  /** count, m: support radius R_i of the weight */
  radii: Float64Array;
  /** count: the body each part belongs to */
  body: Int32Array;
}

/** A connected piece of one material: its parts, weights and points are its own. */
export interface Body {
  /** index into the scene's materials */
  material: number;
  firstPart: number;
  partCount: number;
  /** m³ */
  volume: number;
  /** Patches that bound it. */
  patches: Int32Array;
}

/**
 * Values of the scalar basis at a list of places, sparse over parts.
 * Row r: entries offsets[r] … offsets[r+1]−1; entry e: part parts[e], values[e·basis … e·basis+basis−1].
 */
export interface BasisRows {
  count: number;
  basis: 4 | 10;
  offsets: Int32Array;
  parts: Int32Array;
  values: Float64Array;
}

/**
 * Quadrature points, grouped by active set of parts. Group g: points start[g] … start[g+1]−1,
 * active parts activeParts[activeStart[g] … activeStart[g+1]−1] (ascending), n_g = their number · basis.
 * gradients of group g start at gradientStart[g], layout [point][3][n_g], entry
 * [k][d][m·basis+a] = ∂N_ia/∂X_d at the point, for the m-th active part. 1/m.
 */
export interface QuadraturePoints {
  count: number;
  groupCount: number;
  start: Int32Array;
  activeStart: Int32Array;
  activeParts: Int32Array;
  gradientStart: Int32Array;
  gradients: Float64Array;
  /** 3 · count, m */
  positions: Float64Array;
  /** count, m³, all positive */
  volumes: Float64Array;
  /** count */
  body: Int32Array;
}

/** Dilatation groups: neighbouring parts of one body whose volume change is constrained together. */
export interface DilatationGroups {
  count: number;
  /** quadrature points of group g: points[start[g] … start[g+1]−1] */
  start: Int32Array;
  points: Int32Array;
  /** 4 modes a point: orthonormal (with the volumes as weights) combinations of 1, x, y, z; [entry][4] */
  modes: Float64Array;
  body: Int32Array;
}

/** Symmetric scalar matrix in blocks (basis × basis, row-major), only pairs with row part ≤ column part. */
export interface BlockPairs {
  /** pair p couples parts rows[p] and columns[p] */
  rows: Int32Array;
  columns: Int32Array;
  values: Float64Array;
}

/** Constant scalar matrices of one body, integrated on the fine points: ∫ N N dV (m³) and the
 *  stabilisation form ∫ Σ_i w_i |p_i c_i − x|² dV (m³; of sheets a small share). Density and modulus multiply them later.
 *  ∫ ∇N·∇N dV is left to the mechanics: it must use the same points as the elastic energy. */
export interface BodyMatrices {
  mass: BlockPairs;
  stabilisation: BlockPairs;
}

/** Surface samples: where supports hold, loads push and contact is felt. */
export interface SurfaceSamples {
  count: number;
  /** 3 · count, m, rest */
  positions: Float64Array;
  /** 3 · count, unit, outward after the orientation vote */
  normals: Float64Array;
  /** count, m² of rest area each stands for */
  areas: Float64Array;
  patch: Int32Array;
  body: Int32Array;
  /** count: 1 on the outside of everything, 0 where the surface runs inside its own or another body:
   *  loads, wind and contact act on exposed samples only, supports may hold any. */
  exposed: Uint8Array;
  rows: BasisRows;
  /** Rows of the two tangents, for followed normals: N along ∂/∂t1 and ∂/∂t2, t1 × t2 = normal · area. */
  tangent1: BasisRows;
  tangent2: BasisRows;
}

/** Two sample sets held together: rows `a` (one body) minus rows `b` (another) should vanish. */
export interface Ties {
  count: number;
  a: BasisRows;
  b: BasisRows;
  /** m² each pair stands for */
  areas: Float64Array;
  bodyA: Int32Array;
  bodyB: Int32Array;
}

/** The drawn surface: triangles over all patches, and how its vertices follow the coefficients. */
export interface SurfaceMap {
  /** 3 · vertexCount, m, rest */
  positions: Float32Array;
  /** 3 · vertexCount, unit, outward */
  normals: Float32Array;
  /** 3 · triangleCount */
  triangles: Uint32Array;
  /** vertexCount: patch of each vertex */
  patch: Int32Array;
  /** vertexCount: the part with the largest weight, for tints */
  dominantPart: Int32Array;
  rows: BasisRows;
}

export interface SetupReport {
  seconds: number;
  stages: { name: string; seconds: number }[];
  /** m³ */
  volume: number;
  centroid: [number, number, number];
  /** Second moments of volume about the centroid: xx, yy, zz, xy, yz, zx; m⁵ */
  secondMoments: [number, number, number, number, number, number];
  /** m */
  diagonal: number;
  bounds: { min: [number, number, number]; max: [number, number, number] };
  rays: number;
  finePoints: number;
  /** Sentences a person should read, for example an open shell treated as solid. */
  remarks: string[];
}

export interface Prepared {
  /** metres, turned outward */
  patches: Patch[];
  /** patch: 1 when it was turned over to face outward */
  turned: Uint8Array;
  parts: Parts;
  bodies: Body[];
  points: QuadraturePoints;
  dilatation: DilatationGroups;
  matrices: BodyMatrices[];
  samples: SurfaceSamples;
  ties: Ties;
  surface: SurfaceMap;
  report: SetupReport;
}
