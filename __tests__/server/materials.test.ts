import presets from '../../server/materials/presets.json';
import { materialListSchema } from '../../shared/wire/materials';
import { type Desk, openDesk } from './support/desk';
import { aPreset } from './support/things';

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
    `INSERT INTO material SELECT id, 2, name, family, law, youngs_modulus * 2, NULL, NULL, poissons_ratio, density, source, status, now(), NULL, NULL
     FROM material WHERE id = $1`,
    [first!.id],
  );
  const items = await list();
  expect(items).toHaveLength(presets.length);
  expect(items[0]).toMatchObject({ id: first!.id, version: 2, youngsModulusRange: null });
  await expect(desk.rows('UPDATE material SET density = 1 WHERE id = $1', [first!.id])).rejects.toThrow('written once');
  expect(await desk.services.materials.exists({ id: first!.id, version: 1 }, desk.fair)).toBe(true);
});

const wanted = aPreset();

test('a lead publishes a preset of the production, which another production neither sees nor may use', async () => {
  const path = `/api/productions/${desk.fair}/materials`;
  const { body } = await desk.as('lead').post(path).send(wanted).expect(201);
  expect(body).toMatchObject({ ...wanted, version: 1, productionId: desk.fair });
  expect((await list()).find(({ id }) => id === body.id)).toEqual(body);
  const elsewhere = await desk.as('outsider').get(`/api/productions/${desk.elsewhere}/materials?limit=100`).expect(200);
  expect(elsewhere.body.items.map(({ id }: { id: string }) => id)).not.toContain(body.id);
  expect(await desk.services.materials.exists({ id: body.id, version: 1 }, desk.fair)).toBe(true);
  expect(await desk.services.materials.exists({ id: body.id, version: 1 }, desk.elsewhere)).toBe(false);

  const versions = `/api/materials/${body.id}/versions`;
  const next = { ...wanted, youngsModulus: 1.3e6, basedOn: 1 };
  expect((await desk.as('lead').post(versions).send(next).expect(201)).body).toMatchObject({ version: 2 });
  const late = await desk.as('lead').post(versions).send(next).expect(409);
  expect(late.body.detail).toContain('Version 2 was published meanwhile');
  const kept = await desk.rows('SELECT version FROM material WHERE id = $1 ORDER BY version', [body.id]);
  expect(kept).toEqual([{ version: 1 }, { version: 2 }]);
  const noticed = await desk.rows("SELECT details FROM audit_event WHERE kind = 'material-published'");
  expect(noticed).toHaveLength(2);
});

test.each([
  [{ youngsModulus: 0 }, '/youngsModulus', 'Young’s modulus must be greater than 0.'],
  [{ poissonsRatio: 0.5 }, '/poissonsRatio', 'At 0.5 nothing can change volume. Use 0.49 or less.'],
  [{ youngsModulusRange: [2, 1] }, '/youngsModulusRange', 'The low end lies above the high end.'],
  [{ source: ' ' }, '/source', 'Say where the numbers come from.'],
])('a preset with %j is refused at its place', async (change, pointer, detail) => {
  const { body } = await desk
    .as('lead')
    .post(`/api/productions/${desk.fair}/materials`)
    .send({ ...wanted, ...change })
    .expect(400);
  expect(body.errors).toContainEqual({ pointer, detail });
});

test('the studio’s presets do not change', async () => {
  const shipped = (await list()).find(({ productionId }) => productionId === null)!;
  const { body } = await desk
    .as('lead')
    .post(`/api/materials/${shipped.id}/versions`)
    .send({ ...wanted, basedOn: shipped.version })
    .expect(403);
  expect(body.detail).toContain('Publish one of the production’s own instead');
});
