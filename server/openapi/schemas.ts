import { z } from 'zod';
import { auditListSchema } from '../../shared/wire/audit';
import { liveSchema, readySchema } from '../../shared/wire/health';
import {
  materialListSchema,
  materialPresetSchema,
  presetCreateSchema,
  presetVersionSchema,
} from '../../shared/wire/materials';
import { modelChangeSchema, modelListSchema, modelPatchesSchema, modelSchema } from '../../shared/wire/models';
import { problemSchema } from '../../shared/wire/problem';
import { memberListSchema, productionListSchema } from '../../shared/wire/productions';
import { runCompleteSchema, runCreateSchema, runListSchema, runSchema, runTracesSchema } from '../../shared/wire/runs';
import {
  revisionCreateSchema,
  revisionListSchema,
  revisionSchema,
  sceneCreateSchema,
  sceneListSchema,
  sceneSchema,
} from '../../shared/wire/scenes';
import { sceneDocumentSchema } from '../../shared/scene-document';
import { sessionSchema, signInRequestSchema } from '../../shared/wire/session';

/** What the server answers with, by its name in the OpenAPI document. */
const ANSWERS = {
  AuditList: auditListSchema,
  Live: liveSchema,
  MaterialList: materialListSchema,
  MaterialPreset: materialPresetSchema,
  MemberList: memberListSchema,
  Model: modelSchema,
  ModelList: modelListSchema,
  ModelPatches: modelPatchesSchema,
  Problem: problemSchema,
  ProductionList: productionListSchema,
  Ready: readySchema,
  Revision: revisionSchema,
  RevisionList: revisionListSchema,
  Run: runSchema,
  RunList: runListSchema,
  RunTraces: runTracesSchema,
  Scene: sceneSchema,
  SceneDocument: sceneDocumentSchema,
  SceneList: sceneListSchema,
  Session: sessionSchema,
};

/** What it takes: defaults may be left out here. */
const REQUESTS = {
  ModelChangeRequest: modelChangeSchema,
  PresetRequest: presetCreateSchema,
  PresetVersionRequest: presetVersionSchema,
  RevisionRequest: revisionCreateSchema,
  RunCompleteRequest: runCompleteSchema,
  RunRequest: runCreateSchema,
  SceneDocumentRequest: sceneDocumentSchema,
  SceneRequest: sceneCreateSchema,
  SignInRequest: signInRequestSchema,
};

export type AnswerName = keyof typeof ANSWERS;
export type RequestName = keyof typeof REQUESTS;

const uri = (name: string) => `#/components/schemas/${name}`;

export const refTo = (name: AnswerName | RequestName) => ({ $ref: uri(name) });

function jsonSchemas(named: Record<string, z.ZodType>, io: 'input' | 'output'): [string, unknown][] {
  const registry = z.registry<{ id: string }>();
  for (const [id, schema] of Object.entries(named)) registry.add(schema, { id });
  const { schemas } = z.toJSONSchema(registry, { io, uri });
  return Object.entries(schemas).map(([name, { $schema: _dialect, $id: _id, ...schema }]) => [name, schema]);
}

export function componentSchemas(): Record<string, unknown> {
  return Object.fromEntries([...jsonSchemas(ANSWERS, 'output'), ...jsonSchemas(REQUESTS, 'input')]);
}
