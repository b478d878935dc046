import { readFileSync } from 'node:fs';
import path from 'node:path';
import { defaultDocument } from '../../shared/default-document';
import type { SceneDocument } from '../../shared/scene-document';
import type { Role } from '../../shared/words';
import { readConfig } from '../config';
import { createDataSource } from '../data-source';
import { prepareDatabase } from '../database';
import type { Model } from '../models/model.entity';
import { buildServices } from '../services';
import { DEMO_PEOPLE } from './demo-people.mjs';
import { DEMO_SCENES, type DemoScene } from './demo-scenes';

/**
 * Loads the demo once: invented people of an invented studio, two productions, five models made by this project and
 * a scene for each. Does nothing when anybody is there already.
 */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  const data = await createDataSource(config.DATABASE_URL).initialize();
  const services = buildServices(config, data);
  try {
    await prepareDatabase(data, services.materials);
    const [{ count }] = (await data.query('SELECT count(*)::int AS count FROM person')) as [{ count: number }];
    if (count > 0) return;
    process.stdout.write('Loading the demo …\n');
    const fair = await services.productions.create('The Tide Fair');
    const other = await services.productions.create('Lantern Tests');
    const people = new Map<string, Awaited<ReturnType<typeof services.people.create>>>();
    for (const { name, email, password, administrator, role } of DEMO_PEOPLE) {
      const person = await services.people.create({ name, email, password, administrator });
      people.set(name, person);
      await services.productions.addMember(fair.id, person.id, (role ?? 'lead') as Role);
    }
    // One TD is an artist elsewhere, and one person is in both: what each sees differs.
    await services.productions.addMember(other.id, people.get('Tam Okafor')!.id, 'artist');
    await services.productions.addMember(other.id, people.get('Ines Carrow')!.id, 'lead');
    const director = people.get('Joss Harrow')!;
    for (const scene of DEMO_SCENES) {
      const bytes = readFileSync(path.join('assets/models', scene.file));
      const model = await services.models.upload(director, fair.id, { fileName: scene.file, bytes, name: scene.model });
      await services.models.change(director, model.id, { unit: 0.001, unitConfirmed: true });
      const confirmed = await services.models.get(director, model.id);
      const document = sceneDocument(confirmed, scene);
      await services.scenes.create(director, fair.id, { name: scene.name, document });
    }
  } finally {
    await data.destroy();
  }
}

function sceneDocument(model: Model, scene: DemoScene): SceneDocument {
  const plain = { id: model.id, unit: model.unit, bounds: model.bounds } as Parameters<typeof defaultDocument>[0];
  return { ...defaultDocument(plain, scene.name, []), ...scene.document };
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});
