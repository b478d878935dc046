import type { SceneDocument } from '../../shared/scene-document';
import { lengthText, type LengthUnit } from '../../shared/units';

export type Region = SceneDocument['supports'][number]['region'];

/** A region in words. */
export function regionWords(region: Region, unit: LengthUnit): string {
  switch (region.kind) {
    case 'all':
      return 'the whole surface';
    case 'plane':
      return `within ${lengthText(region.tolerance, unit)} of a plane`;
    case 'box':
      return 'inside a box';
    case 'sphere':
      return `within ${lengthText(region.radius, unit)} of a point`;
    case 'patches':
      return `${region.patches.length} patch${region.patches.length === 1 ? '' : 'es'} picked`;
  }
}

/** The middle of a region, m; null when only the surface knows. */
export function regionPlace(region: Region): [number, number, number] | null {
  switch (region.kind) {
    case 'plane':
      return region.point;
    case 'box':
      return [0, 1, 2].map((d) => (region.min[d]! + region.max[d]!) / 2) as [number, number, number];
    case 'sphere':
      return region.centre;
    default:
      return null;
  }
}
