import type { SceneMaterial } from '../scene';

/**
 * Material index of every patch: the one that lists it, otherwise the one without a list, otherwise
 * the first (with a remark). A patch number that does not exist is an error.
 */
export function patchMaterials(materials: readonly SceneMaterial[], patchCount: number, remarks: string[]): Int32Array {
  if (materials.length === 0) throw new RangeError('The scene has no material. Give the body one.');
  const rest = materials.findIndex((m) => m.patches === undefined);
  const out = new Int32Array(patchCount).fill(rest);
  materials.forEach((material, index) => {
    for (const patch of material.patches ?? []) {
      if (!(patch >= 0 && patch < patchCount)) {
        throw new RangeError(
          `Material “${material.name}” names patch ${patch}, but the model has patches 0 to ${patchCount - 1}. Correct its list of patches.`,
        );
      }
      out[patch] = index;
    }
  });
  const unclaimed = out.reduce((n, m) => n + (m < 0 ? 1 : 0), 0);
  if (unclaimed > 0) {
    remarks.push(`${unclaimed} of ${patchCount} patches have no material; they take “${materials[0]!.name}”.`);
    for (let k = 0; k < patchCount; k++) if (out[k]! < 0) out[k] = 0;
  }
  return out;
}
