import type { DataSource } from 'typeorm';
import { AuditService } from './audit/audit.service';
import type { Config } from './config';
import { HealthService } from './health/health.service';
import { MaterialsService } from './materials/materials.service';
import { ModelReader } from './models/model-reader';
import { ModelsService } from './models/models.service';
import { Passwords } from './people/passwords';
import { PeopleService } from './people/people.service';
import { MembershipsService } from './productions/memberships.service';
import { ProductionsService } from './productions/productions.service';
import { RunPartsService } from './runs/run-parts.service';
import { RunViews } from './runs/run-views';
import { RunsService } from './runs/runs.service';
import { ScenesService } from './scenes/scenes.service';
import { SessionsService } from './sessions/sessions.service';
import { Tokens } from './sessions/tokens';

export type Services = ReturnType<typeof buildServices>;

function modelReader(config: Config): ModelReader {
  return new ModelReader({
    seconds: config.LOLLOP_READ_MODEL_SECONDS,
    megabytes: config.LOLLOP_READ_MODEL_MEGABYTES,
    readers: config.LOLLOP_MODEL_READERS,
  });
}

/** Puts the services together. Works without HTTP, for seeding and commands too. */
export function buildServices(config: Config, data: DataSource, reader = modelReader(config)) {
  const tokens = new Tokens(config.LOLLOP_TOKEN_SECRET, config.LOLLOP_ACCESS_MINUTES);
  const people = new PeopleService(data, new Passwords(config.LOLLOP_PASSWORD_COST));
  const audit = new AuditService(data);
  const memberships = new MembershipsService(data);
  const productions = new ProductionsService(data, memberships);
  const models = new ModelsService(data, memberships, audit, reader);
  const materials = new MaterialsService(data, memberships, audit);
  const scenes = new ScenesService(data, memberships, models, materials, audit);
  const runs = new RunsService(data, new RunViews(data), memberships, productions, scenes, audit);
  return {
    health: new HealthService(data),
    people,
    audit,
    memberships,
    productions,
    models,
    materials,
    scenes,
    runs,
    runParts: new RunPartsService(data, runs),
    sessions: new SessionsService(data, people, audit, tokens, config.LOLLOP_SESSION_DAYS),
  };
}
