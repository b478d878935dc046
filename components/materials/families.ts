import type { MaterialPreset } from '../../shared/wire/materials';

export type Marker = 'circle' | 'triangle' | 'square' | 'diamond';

/** Families in the order of the list, softest kinds first; the marker carries the kind in the chart. */
const GROUPS: readonly { title: string; marker: Marker; families: readonly string[] }[] = [
  { title: 'Gels and food', marker: 'circle', families: ['gel', 'food'] },
  { title: 'Flesh', marker: 'circle', families: ['flesh'] },
  { title: 'Silicones and rubbers', marker: 'triangle', families: ['silicone', 'rubber'] },
  { title: 'Foams', marker: 'square', families: ['foam'] },
  { title: 'Leather and cloth', marker: 'diamond', families: ['leather and cloth'] },
];
const OTHERS = { title: 'Stiff things', marker: 'diamond' as const };

const groupOf = (family: string) => GROUPS.find((group) => group.families.includes(family)) ?? OTHERS;

export const markerOf = (material: MaterialPreset): Marker => groupOf(material.family).marker;

/** Presets by group, each from soft to stiff; empty groups are left out. */
export function grouped(materials: readonly MaterialPreset[]): { title: string; materials: MaterialPreset[] }[] {
  return [...GROUPS, OTHERS]
    .map(({ title }) => ({
      title,
      materials: materials
        .filter((material) => groupOf(material.family).title === title)
        .sort((a, b) => a.youngsModulus - b.youngsModulus),
    }))
    .filter((group) => group.materials.length > 0);
}

/** Presets whose name or family holds what was typed. */
export function matching(materials: readonly MaterialPreset[], typed: string): MaterialPreset[] {
  const wanted = typed.trim().toLowerCase();
  return materials.filter((m) => `${m.name} ${m.family}`.toLowerCase().includes(wanted));
}
