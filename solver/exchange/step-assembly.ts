import { layersOf, representationItems, surfacesIn, type SurfaceUse } from './step-contents';
import { axisPlacement, compose, IDENTITY, invertRigid, scaledPlacement, type Placement } from './step-placement';
import type { StepFile } from './step-tokenizer';
import { contextUnit } from './step-units';
import { nameOf, recordOf, refOf } from './step-values';

/** One showing of a surface in the finished assembly. */
export interface Occurrence extends SurfaceUse {
  placement: Placement;
  /** Metres per unit of its coordinates; null when its representation does not say. */
  metres: number | null;
}

/** More placed pieces than this are damage or a runaway nesting. */
const MAX_VISITS = 50_000;

/** A representation and those declared to be the same as it. */
interface Node {
  uses: SurfaceUse[];
  metres: number | null;
  product: number | null;
  children: { node: Node; placement: Placement }[];
  placed: boolean;
  /** The node that this one was merged into. */
  same: Node | null;
}

/** Deeper assemblies than this are damage. */
const MAX_DEPTH = 64;

/**
 * Every B-spline surface of the file where the assembly puts it (ISO 10303-43 representation relationships and mapped
 * items, ISO 10303-44 assemblies). Surfaces that no representation shows are left to the caller. `metres` is the unit
 * that the placements are expressed in.
 */
export function occurrencesOf(file: StepFile, metres: number | null): { occurrences: Occurrence[]; remarks: string[] } {
  const remarks = new Set<string>();
  const nodes = representationNodes(file);
  linkRelationships(file, nodes, metres, remarks);
  linkMappedItems(file, nodes, metres, remarks);
  const all = [...new Set(nodes.values())];
  const products = new Set(all.filter((n) => n.uses.length > 0).map((n) => n.product)).size;
  const occurrences: Occurrence[] = [];
  const todo = all.filter((node) => !node.placed).map((node) => ({ node, placement: IDENTITY, path: [node] }));
  let visits = 0;
  while (todo.length > 0) {
    const { node, placement, path } = todo.pop()!;
    if (++visits > MAX_VISITS) {
      remarks.add('The file places more pieces than can be read. The rest was left out.');
      break;
    }
    const group = products > 1 && node.product !== null ? productName(file, node.product) : '';
    for (const use of node.uses)
      occurrences.push({ ...use, group: use.group || group, placement, metres: node.metres });
    for (const child of node.children) {
      if (path.includes(child.node) || path.length >= MAX_DEPTH)
        remarks.add('A piece that the file places inside itself was left out there.');
      else todo.push({ node: child.node, placement: compose(placement, child.placement), path: [...path, child.node] });
    }
  }
  return { occurrences, remarks: [...remarks] };
}

/** One node a representation; those related without a transformation share theirs. */
function representationNodes(file: StepFile): Map<number, Node> {
  const nodes = new Map<number, Node>();
  const layers = layersOf(file);
  for (const instance of file.instances.values()) {
    const found = representationItems(instance);
    if (!found) continue;
    const context = file.instances.get(refOf(found.context) ?? -1);
    nodes.set(instance.id, {
      uses: surfacesIn(file, found.items, layers),
      metres: contextUnit(file, context)?.metres ?? null,
      product: null,
      children: [],
      placed: false,
      same: null,
    });
  }
  for (const instance of file.instances.values()) {
    const record = recordOf(instance, 'SHAPE_DEFINITION_REPRESENTATION');
    const node = nodes.get(refOf(record?.args[1]) ?? -1);
    if (node) node.product = definitionOf(file, refOf(record!.args[0]));
  }
  for (const instance of file.instances.values()) {
    if (instance.records.length !== 1) continue;
    const record =
      recordOf(instance, 'SHAPE_REPRESENTATION_RELATIONSHIP') ?? recordOf(instance, 'REPRESENTATION_RELATIONSHIP');
    const a = mergedNode(nodes.get(refOf(record?.args[2]) ?? -1));
    const b = mergedNode(nodes.get(refOf(record?.args[3]) ?? -1));
    if (!a || !b || a === b) continue;
    for (const use of b.uses) a.uses.push(use);
    a.metres ??= b.metres;
    a.product ??= b.product;
    b.uses = [];
    b.same = a;
  }
  for (const [id, node] of nodes) nodes.set(id, mergedNode(node)!);
  for (const node of new Set(nodes.values())) {
    node.uses = [...new Map(node.uses.map((use) => [use.surface, use])).values()];
  }
  return nodes;
}

/** The node that stands for `node` after merging; shortens the way there for the next search. */
function mergedNode(node: Node | undefined): Node | undefined {
  let top = node;
  while (top?.same) top = top.same;
  for (let at = node; at?.same; ) {
    const next: Node = at.same;
    at.same = top!;
    at = next === top ? undefined : next;
  }
  return top;
}

/** Child → parent by REPRESENTATION_RELATIONSHIP_WITH_TRANSFORMATION. */
function linkRelationships(
  file: StepFile,
  nodes: Map<number, Node>,
  metres: number | null,
  remarks: Set<string>,
): void {
  const parentProduct = new Map<number, number | null>();
  for (const instance of file.instances.values()) {
    const record = recordOf(instance, 'CONTEXT_DEPENDENT_SHAPE_REPRESENTATION');
    const shape = recordOf(file.instances.get(refOf(record?.args[1]) ?? -1), 'PRODUCT_DEFINITION_SHAPE');
    const usage = recordOf(file.instances.get(refOf(shape?.args[2]) ?? -1), 'NEXT_ASSEMBLY_USAGE_OCCURRENCE');
    if (record && usage) parentProduct.set(refOf(record.args[0]) ?? -1, refOf(usage.args[3]));
  }
  for (const instance of file.instances.values()) {
    const relation = recordOf(instance, 'REPRESENTATION_RELATIONSHIP');
    const operator = recordOf(instance, 'REPRESENTATION_RELATIONSHIP_WITH_TRANSFORMATION');
    if (!relation || !operator) continue;
    const first = nodes.get(refOf(relation.args[2]) ?? -1);
    const second = nodes.get(refOf(relation.args[3]) ?? -1);
    if (!first || !second) continue;
    const transformation = recordOf(file.instances.get(refOf(operator.args[0]) ?? -1), 'ITEM_DEFINED_TRANSFORMATION');
    // The first representation is the piece and the second the assembly, unless the usage says otherwise.
    const parent = parentProduct.get(instance.id);
    const swapped = parent !== undefined && parent !== null && parent === first.product && parent !== second.product;
    const [child, whole] = swapped ? [second, first] : [first, second];
    const [from, to] = swapped ? [3, 2] : [2, 3];
    attach(
      whole,
      child,
      placementBetween(file, transformation?.args[from], transformation?.args[to], child, whole, metres),
      remarks,
    );
  }
}

function linkMappedItems(file: StepFile, nodes: Map<number, Node>, metres: number | null, remarks: Set<string>): void {
  for (const instance of file.instances.values()) {
    const whole = nodes.get(instance.id);
    for (const item of (whole && representationItems(instance)?.items) ?? []) {
      const mapped = recordOf(file.instances.get(refOf(item) ?? -1), 'MAPPED_ITEM');
      const map = recordOf(file.instances.get(refOf(mapped?.args[1]) ?? -1), 'REPRESENTATION_MAP');
      const child = nodes.get(refOf(map?.args[1]) ?? -1);
      if (whole && child)
        attach(whole, child, placementBetween(file, map!.args[0], mapped!.args[2], child, whole, metres), remarks);
    }
  }
}

function attach(whole: Node, child: Node, placement: Placement | null, remarks: Set<string>): void {
  if (!placement)
    remarks.add('The place of a piece in its assembly could not be read. The piece is shown where it was drawn.');
  whole.children.push({ node: child, placement: placement ?? IDENTITY });
  child.placed = true;
}

/** Takes the frame `from` of the child to the frame `to` of the whole, both given in their own units. */
function placementBetween(
  file: StepFile,
  from: Parameters<typeof refOf>[0],
  to: Parameters<typeof refOf>[0],
  child: Node,
  whole: Node,
  metres: number | null,
): Placement | null {
  const a = axisPlacement(file, refOf(from));
  const b = axisPlacement(file, refOf(to));
  if (!a || !b) return null;
  const ratio = (own: number | null) => (own !== null && metres !== null ? own / metres : 1);
  const placement = compose(
    scaledPlacement(b, ratio(whole.metres)),
    invertRigid(scaledPlacement(a, ratio(child.metres))),
  );
  // Frames that coincide give the identity, but for the last bit: keep such coordinates as the file has them.
  return placement.every((x, k) => Math.abs(x - IDENTITY[k]!) <= 1e-15) ? IDENTITY : placement;
}

function definitionOf(file: StepFile, shape: number | null): number | null {
  return refOf(recordOf(file.instances.get(shape ?? -1), 'PRODUCT_DEFINITION_SHAPE')?.args[2]);
}

function productName(file: StepFile, definition: number): string {
  const own = file.instances.get(definition)?.records[0];
  const formation = file.instances.get(refOf(own?.args[2]) ?? -1)?.records[0];
  const product = recordOf(file.instances.get(refOf(formation?.args[2]) ?? -1), 'PRODUCT');
  return nameOf(product?.args[1]) || nameOf(product?.args[0]);
}
