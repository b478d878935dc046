import { faceRecord } from './step-faces';
import { isSpline } from './step-surface';
import type { StepFile, StepInstance, StepValue } from './step-tokenizer';
import { isFalse, listOf, nameOf, recordOf, refOf } from './step-values';

/** A B-spline surface as one representation shows it. */
export interface SurfaceUse {
  surface: number;
  /** The face that shows it, or null when it lies loose. */
  face: number | null;
  reversed: boolean;
  name: string;
  group: string;
}

/** Solids, shells and sets: the argument that lists their members, and whether an orientation flag follows. */
const CONTAINERS: Record<string, { members: number[]; orientation?: number }> = {
  MANIFOLD_SOLID_BREP: { members: [1] },
  FACETED_BREP: { members: [1] },
  BREP_WITH_VOIDS: { members: [1, 2] },
  SHELL_BASED_SURFACE_MODEL: { members: [1] },
  FACE_BASED_SURFACE_MODEL: { members: [1] },
  OPEN_SHELL: { members: [1] },
  CLOSED_SHELL: { members: [1] },
  CONNECTED_FACE_SET: { members: [1] },
  ORIENTED_OPEN_SHELL: { members: [2], orientation: 3 },
  ORIENTED_CLOSED_SHELL: { members: [2], orientation: 3 },
  ORIENTED_FACE: { members: [2], orientation: 3 },
  GEOMETRIC_SET: { members: [1] },
};

/** B-spline surfaces among the items of a representation, each once, with the names and the orientation they inherit. */
export function surfacesIn(
  file: StepFile,
  items: readonly StepValue[],
  layers: ReadonlyMap<number, string>,
): SurfaceUse[] {
  const uses = new Map<number, SurfaceUse>();
  const seen = new Set<number>();
  const todo = items.map((item) => ({ id: refOf(item), group: '', reversed: false })).reverse();
  while (todo.length > 0) {
    const { id, group, reversed } = todo.pop()!;
    const instance = id === null ? undefined : file.instances.get(id);
    if (!instance || seen.has(instance.id)) continue;
    seen.add(instance.id);
    const layer = layers.get(instance.id) ?? '';
    if (isSpline(instance)) {
      if (!uses.has(instance.id)) {
        uses.set(instance.id, { surface: instance.id, face: null, reversed, name: '', group: group || layer });
      }
      continue;
    }
    const face = faceRecord(instance);
    if (face) {
      const surface = file.instances.get(refOf(face.args[2]) ?? -1);
      if (surface && isSpline(surface) && !uses.has(surface.id)) {
        uses.set(surface.id, {
          surface: surface.id,
          face: instance.id,
          reversed: reversed !== isFalse(face.args[3]),
          name: nameOf(face.args[0]),
          group: group || layer,
        });
      }
      continue;
    }
    const record = instance.records.find((r) => CONTAINERS[r.type]);
    if (!record) continue;
    const { members, orientation } = CONTAINERS[record.type]!;
    const inherited = {
      group: group || nameOf(record.args[0]) || layer,
      reversed: reversed !== (orientation !== undefined && isFalse(record.args[orientation])),
    };
    const inside = members.flatMap((at) =>
      Array.isArray(record.args[at]) ? listOf(record.args[at]) : [record.args[at] ?? null],
    );
    for (const member of inside.reverse()) todo.push({ id: refOf(member), ...inherited });
  }
  return [...uses.values()];
}

/** Names of layers by the item that lies on them. */
export function layersOf(file: StepFile): Map<number, string> {
  const layers = new Map<number, string>();
  for (const instance of file.instances.values()) {
    const record = recordOf(instance, 'PRESENTATION_LAYER_ASSIGNMENT');
    const name = nameOf(record?.args[0]);
    if (name) for (const item of listOf(record?.args[2])) layers.set(refOf(item) ?? -1, name);
  }
  return layers;
}

/** Items of a representation (name, items, context), or null for other instances. */
export function representationItems(
  instance: StepInstance,
): { items: StepValue[]; context: StepValue | undefined } | null {
  for (const { type, args } of instance.records) {
    if (type.endsWith('REPRESENTATION') && args.length === 3 && Array.isArray(args[1]) && refOf(args[2]) !== null) {
      return { items: args[1], context: args[2] };
    }
  }
  return null;
}
