import { fireEvent, render, screen } from '@testing-library/react';
import { grouped, matching } from '../../components/materials/families';
import { MaterialDetail } from '../../components/materials/material-detail';
import { MaterialList } from '../../components/materials/material-list';
import { CAUTION } from '../../shared/words';
import type { MaterialPreset } from '../../shared/wire/materials';

const preset = (name: string, family: string, youngsModulus: number): MaterialPreset => ({
  id: name,
  version: 2,
  name,
  family,
  law: 'stable-neo-hookean',
  youngsModulus,
  youngsModulusRange: [youngsModulus / 2, youngsModulus * 2],
  poissonsRatio: 0.49,
  density: 1010,
  source: 'invented for this test',
  status: 'from memory',
  productionId: null,
});
const ALL = [preset('Oak', 'wood and paper', 1e10), preset('Agar', 'gel', 4e4), preset('Jelly', 'gel', 1250)];

it('groups by kind, soft before stiff, kinds nobody named last', () => {
  expect(grouped(ALL).map((g) => [g.title, g.materials.map((m) => m.name)])).toEqual([
    ['Gels and food', ['Jelly', 'Agar']],
    ['Stiff things', ['Oak']],
  ]);
});

it('finds by name or family, whatever the case', () => {
  expect(matching(ALL, ' GEL ').map((m) => m.name)).toEqual(['Agar', 'Jelly']);
  expect(matching(ALL, 'oa').map((m) => m.name)).toEqual(['Oak']);
});

it('lists each with its stiffness and tells which was chosen', () => {
  const choose = jest.fn();
  render(<MaterialList materials={ALL} chosen="Agar" onChoose={choose} />);
  expect(screen.getByRole('button', { name: 'Agar, 40 kPa' }).getAttribute('aria-pressed')).toBe('true');
  fireEvent.click(screen.getByRole('button', { name: 'Oak, 10 GPa' }));
  expect(choose).toHaveBeenCalledWith('Oak');
});

it('shows a value within its range, its source, and the caution', () => {
  render(<MaterialDetail material={ALL[2]!} />);
  expect(screen.getByRole('img', { name: 'Young’s modulus: 1.25 kPa, from 625 Pa to 2.5 kPa' })).toBeTruthy();
  expect(screen.getByText('Invented for this test.')).toBeTruthy();
  expect(screen.getByText(CAUTION)).toBeTruthy();
});
