import presets from '../../server/materials/presets.json';
import { materialListSchema } from '../../shared/wire/materials';
import { type Desk, openDesk } from './support/desk';

let desk: Desk;

beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk?.close());

const list = async () => {
  const response = await desk.as('artist').get(`/api/productions/${desk.fair}/materials?limit=100`).expect(200);
  return materialListSchema.parse(response.body).items;
};

test('the shipped presets are there, sorted by name, each with source, status and numbers in range', async () => {
  const items = await list();
  expect(items).toHaveLength(presets.length);
  expect(items.length).toBeGreaterThanOrEqual(40);
  for (const { source, status, family, youngsModulus, youngsModulusRange } of items) {
    expect(source.length * status.length * family.length).toBeGreaterThan(0);
    expect(source).not.toMatch(/https?:/);
    const [low, high] = youngsModulusRange!;
    expect(youngsModulus).toBeGreaterThanOrEqual(low);
    expect(youngsModulus).toBeLessThanOrEqual(high);
  }
  const names = await desk.rows<{ name: string }>('SELECT name FROM material ORDER BY name, id');
  expect(items.map(({ name }) => name)).toEqual(names.map(({ name }) => name));
});

// A.N. Gent, Rubber Chem. Technol. 31 (1958) 896: E[MPa] = 0.0981 (56 + 7.62336 S) / (0.137505 (254 - 2.54 S)).
test.each([10, 20, 30, 40, 50, 60])(
  'silicone of Shore A%i has the modulus of the formula of Gent (1958)',
  async (hardness) => {
    const item = (await list()).find(({ name }) => name === `Silicone Shore A${hardness}`);
    const megapascals = (0.0981 * (56 + 7.62336 * hardness)) / (0.137505 * (254 - 2.54 * hardness));
    // The preset is rounded to 100 Pa.
    expect(Math.abs(item!.youngsModulus - megapascals * 1e6)).toBeLessThanOrEqual(60);
  },
);

test('adding the presets again changes nothing', async () => {
  const before = await desk.rows('SELECT * FROM material ORDER BY id');
  await desk.services.materials.addPresets();
  expect(await desk.rows('SELECT * FROM material ORDER BY id')).toEqual(before);
});

test('of several versions the newest is listed, and the older one is kept as it was', async () => {
  const [first] = await list();
  await desk.rows(
    `INSERT INTO material SELECT id, 2, name, family, law, youngs_modulus * 2, NULL, NULL, poissons_ratio, density, source, status
     FROM material WHERE id = $1`,
    [first!.id],
  );
  const items = await list();
  expect(items).toHaveLength(presets.length);
  expect(items[0]).toMatchObject({ id: first!.id, version: 2, youngsModulusRange: null });
  await expect(desk.rows('UPDATE material SET density = 1 WHERE id = $1', [first!.id])).rejects.toThrow('written once');
  expect(await desk.services.materials.exists({ id: first!.id, version: 1 })).toBe(true);
});
