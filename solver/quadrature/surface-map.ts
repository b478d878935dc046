import { tessellateForDisplay } from '../geometry/display-mesh';
import type { Patch } from '../geometry/patch';
import type { Tessellation } from '../geometry/tessellate';
import type { BasisField } from '../weights/basis-field';
import type { SurfaceMap } from './prepared';
import { RowBuilder } from './rows';

/** Settings that, with patches and parts, fix the drawn surface to the bit. */
export interface DisplaySettings {
  /** m */
  diagonal: number;
  vertexBudget: number;
}

export const VERTEX_BUDGET = 20000;

/** Triangles of the drawn surface. Patches in metres, turned outward. */
export function displayMesh(patches: readonly Patch[], display: DisplaySettings): Tessellation {
  return tessellateForDisplay(patches, display.diagonal, display.vertexBudget);
}

/** The drawn surface and how it follows the parts. */
export function surfaceMap(mesh: Tessellation, bodyOfPatch: Int32Array, field: BasisField): SurfaceMap {
  const count = mesh.patch.length;
  const rows = new RowBuilder(field.basis, count);
  const dominantPart = new Int32Array(count);
  for (let v = 0; v < count; v++) {
    const n = field.evaluate(
      mesh.positions[3 * v]!,
      mesh.positions[3 * v + 1]!,
      mesh.positions[3 * v + 2]!,
      bodyOfPatch[mesh.patch[v]!]!,
      false,
    );
    rows.pushValues(field);
    let best = 0;
    for (let m = 1; m < n; m++) if (field.sample.weights[m]! > field.sample.weights[best]!) best = m;
    dominantPart[v] = field.sample.parts[best]!;
  }
  return {
    positions: Float32Array.from(mesh.positions),
    normals: Float32Array.from(mesh.normals),
    triangles: mesh.triangles,
    patch: mesh.patch,
    dominantPart,
    rows: rows.done(),
  };
}
