import { dilatationParts } from '../energy/elastic';
import { eliminate, PartGraph, type BlockPattern } from '../linear/block-pattern';
import type { BasisRows, Prepared } from '../quadrature/prepared';

/** The part pairs that any term of the energy can couple. */
export function systemPattern(prepared: Prepared): BlockPattern {
  const { parts, points, matrices, samples, ties } = prepared;
  const graph = new PartGraph(parts.count);
  for (let g = 0; g < points.groupCount; g++)
    graph.join(points.activeParts, points.activeStart[g]!, points.activeStart[g + 1]!);
  for (const list of dilatationParts(prepared)) graph.join(list);
  for (const { mass, stabilisation } of matrices) {
    for (const form of [mass, stabilisation]) {
      for (let p = 0; p < form.rows.length; p++) graph.join([form.rows[p]!, form.columns[p]!]);
    }
  }
  joinRows(graph, samples.rows);
  for (let k = 0; k < ties.count; k++) {
    graph.join([
      ...ties.a.parts.subarray(ties.a.offsets[k]!, ties.a.offsets[k + 1]!),
      ...ties.b.parts.subarray(ties.b.offsets[k]!, ties.b.offsets[k + 1]!),
    ]);
  }
  joinRows(graph, prepared.surface.rows);
  return eliminate(graph, 3 * parts.basis);
}

function joinRows(graph: PartGraph, rows: BasisRows): void {
  for (let r = 0; r < rows.count; r++) graph.join(rows.parts, rows.offsets[r]!, rows.offsets[r + 1]!);
}
