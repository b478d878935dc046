import type { FinePoints } from './fine-points';
import type { Piece } from './pieces';
import type { SetupReport } from './prepared';

/** Volume (m³), centroid (m) and second moments about it (m⁵; xx, yy, zz, xy, yz, zx) of all bodies' fine points. */
export function massReport(fine: readonly FinePoints[]): Pick<SetupReport, 'volume' | 'centroid' | 'secondMoments'> {
  let volume = 0;
  const centroid: [number, number, number] = [0, 0, 0];
  for (const { count, positions, volumes } of fine) {
    for (let k = 0; k < count; k++) {
      volume += volumes[k]!;
      for (let d = 0; d < 3; d++) centroid[d]! += volumes[k]! * positions[3 * k + d]!;
    }
  }
  for (let d = 0; d < 3; d++) centroid[d]! /= volume || 1;
  const secondMoments: SetupReport['secondMoments'] = [0, 0, 0, 0, 0, 0];
  for (const { count, positions, volumes } of fine) {
    for (let k = 0; k < count; k++) {
      const x = positions[3 * k]! - centroid[0];
      const y = positions[3 * k + 1]! - centroid[1];
      const z = positions[3 * k + 2]! - centroid[2];
      const v = volumes[k]!;
      secondMoments[0] += v * x * x;
      secondMoments[1] += v * y * y;
      secondMoments[2] += v * z * z;
      secondMoments[3] += v * x * y;
      secondMoments[4] += v * y * z;
      secondMoments[5] += v * z * x;
    }
  }
  return { volume, centroid, secondMoments };
}

export interface PieceFindings {
  turned: Uint8Array;
  solids: readonly { piece: Piece; sheet: boolean }[];
  /** pieces of which overlaps leave nothing */
  lost: readonly Piece[];
  /** of sheets, m */
  thickness: number;
}

/** What the person should know about sides, open pieces and patches that take no part. */
export function pieceRemarks({ turned, solids, lost, thickness }: PieceFindings): string[] {
  const remarks: string[] = [];
  const used =
    solids.reduce((n, { piece }) => n + piece.patches.length, 0) +
    lost.reduce((n, piece) => n + piece.patches.length, 0);
  const flat = turned.length - used;
  if (flat > 0)
    remarks.push(
      `${flat} of ${turned.length} patches ${flat === 1 ? 'has no area and takes' : 'have no area and take'} no part.`,
    );
  if (lost.length > 0) {
    remarks.push(`Patches ${patchList(lost)} lie wholly inside other materials and take no part.`);
  }
  const over = turned.reduce((a, b) => a + b, 0);
  if (over > 0) remarks.push(`${over} of ${turned.length} patches faced inward and were turned over.`);
  const open = solids.filter(({ piece, sheet }) => !piece.closed && !sheet);
  if (open.length > 0) {
    remarks.push(
      `${open.length === 1 ? 'One piece has' : `${open.length} pieces have`} open edges and ${open.length === 1 ? 'is' : 'are'} treated as solid: patches ${patchList(open.map(({ piece }) => piece))}.`,
    );
  }
  const sheets = solids.filter(({ sheet }) => sheet);
  if (sheets.length > 0) {
    remarks.push(
      `${sheets.length === 1 ? 'One piece encloses' : `${sheets.length} pieces enclose`} nothing and ${sheets.length === 1 ? 'is' : 'are'} treated as ${sheets.length === 1 ? 'a sheet' : 'sheets'} ${lengthText(thickness)} thick, 1 % of the model's diagonal: patches ${patchList(sheets.map(({ piece }) => piece))}.`,
    );
  }
  return remarks;
}

function patchList(pieces: readonly Piece[]): string {
  const numbers = pieces.flatMap(({ patches }) => Array.from(patches)).sort((a, b) => a - b);
  const shown = numbers.slice(0, 12).join(', ');
  return numbers.length > 12 ? `${shown} and ${numbers.length - 12} more` : shown;
}

function lengthText(metres: number): string {
  if (metres >= 1) return `${Number(metres.toPrecision(3))} m`;
  return metres >= 0.01
    ? `${Number((100 * metres).toPrecision(3))} cm`
    : `${Number((1000 * metres).toPrecision(3))} mm`;
}
