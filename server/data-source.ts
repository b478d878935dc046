import { DataSource } from 'typeorm';
import { AuditEvent } from './audit/audit-event.entity';
import { PeopleAndProductions1796106000000 } from './migrations/1796106000000-people-and-productions';
import { Material } from './materials/material.entity';
import { ModelsScenesAndRuns1796107000000 } from './migrations/1796107000000-models-scenes-and-runs';
import { KeepWhatIsWritten1796107100000 } from './migrations/1796107100000-keep-what-is-written';
import { PresetsOfAProduction1796124376054 } from './migrations/1796124376054-presets-of-a-production';
import { ThingsOfOneProduction1796108800000 } from './migrations/1796108800000-things-of-one-production';
import { Model } from './models/model.entity';
import { SnakeNaming } from './naming';
import { Person } from './people/person.entity';
import { Membership } from './productions/membership.entity';
import { Production } from './productions/production.entity';
import { Run } from './runs/run.entity';
import { RunCheckpoint } from './runs/run-checkpoint.entity';
import { RunChunk } from './runs/run-chunk.entity';
import { RunRecipe } from './runs/run-recipe.entity';
import { Scene } from './scenes/scene.entity';
import { SceneRevision } from './scenes/scene-revision.entity';
import { RefreshToken } from './sessions/refresh-token.entity';
import { RefreshSession } from './sessions/session.entity';

const entities = [
  Person,
  RefreshSession,
  RefreshToken,
  Production,
  Membership,
  Model,
  Material,
  Scene,
  SceneRevision,
  Run,
  RunChunk,
  RunRecipe,
  RunCheckpoint,
  AuditEvent,
];

const migrations = [
  PeopleAndProductions1796106000000,
  ModelsScenesAndRuns1796107000000,
  KeepWhatIsWritten1796107100000,
  ThingsOfOneProduction1796108800000,
  PresetsOfAProduction1796124376054,
];

export function createDataSource(url: string): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities,
    migrations,
    namingStrategy: new SnakeNaming(),
    synchronize: false,
    uuidExtension: 'pgcrypto',
    installExtensions: false,
    applicationName: 'lollop',
    extra: { max: 10 },
  });
}
