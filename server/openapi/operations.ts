import type { AnswerName, RequestName } from './schemas';

export interface Operation {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Express's form, `/api/models/:modelId` */
  path: string;
  summary: string;
  /** bearer: an access token; cookie: the refresh token and the header X-Lollop; nobody: open */
  who: 'bearer' | 'cookie' | 'nobody';
  body?: RequestName | 'bytes' | 'model file';
  answer: { status: number; body: AnswerName | 'bytes' | 'nothing' };
  /** Statuses of problems beyond 401, 403 and 404 of bearer routes. */
  problems?: number[];
  paged?: boolean;
  query?: { name: string; type: 'integer' }[];
}

const of = (status: number, body: Operation['answer']['body']) => ({ status, body });
const list = (path: string, summary: string, schema: AnswerName): Operation => ({
  method: 'get',
  path,
  summary,
  who: 'bearer',
  answer: of(200, schema),
  problems: [400],
  paged: true,
});
const bytes = (path: string, what: string): Operation => ({
  method: 'get',
  path,
  summary: `The bytes of ${what}`,
  who: 'bearer',
  answer: of(200, 'bytes'),
});
const sendBytes = (path: string, what: string): Operation => ({
  method: 'put',
  path,
  summary: `Send ${what}`,
  who: 'bearer',
  body: 'bytes',
  answer: of(204, 'nothing'),
  problems: [400, 409, 413, 422],
});

/** Every address of the API; a test holds it against the routes of the server. */
export const OPERATIONS: Operation[] = [
  { method: 'get', path: '/api/health/live', summary: 'The server runs', who: 'nobody', answer: of(200, 'Live') },
  {
    method: 'get',
    path: '/api/health/ready',
    summary: 'The server can work; 503 while it cannot',
    who: 'nobody',
    answer: of(200, 'Ready'),
  },
  {
    method: 'post',
    path: '/api/session',
    summary: 'Sign in',
    who: 'nobody',
    body: 'SignInRequest',
    answer: of(200, 'Session'),
    problems: [400, 401, 429],
  },
  {
    method: 'post',
    path: '/api/session/refresh',
    summary: 'Renew the access token',
    who: 'cookie',
    answer: of(200, 'Session'),
    problems: [401, 403],
  },
  {
    method: 'delete',
    path: '/api/session',
    summary: 'Sign out',
    who: 'cookie',
    answer: of(204, 'nothing'),
    problems: [403],
  },
  list('/api/productions', 'Productions of the person; all of them for an administrator', 'ProductionList'),
  list('/api/productions/:productionId/members', 'Members of a production and their roles', 'MemberList'),
  list('/api/productions/:productionId/models', 'Models of a production, newest first', 'ModelList'),
  {
    method: 'post',
    path: '/api/productions/:productionId/models',
    summary: 'Check a model file in',
    who: 'bearer',
    body: 'model file',
    answer: of(201, 'Model'),
    problems: [400, 413, 422],
  },
  {
    method: 'get',
    path: '/api/models/:modelId',
    summary: 'A model and what reading it found',
    who: 'bearer',
    answer: of(200, 'Model'),
  },
  {
    method: 'patch',
    path: '/api/models/:modelId',
    summary: 'Change name or unit, or confirm the unit',
    who: 'bearer',
    body: 'ModelChangeRequest',
    answer: of(200, 'Model'),
    problems: [400],
  },
  {
    method: 'get',
    path: '/api/models/:modelId/patches',
    summary: 'The surfaces of a model',
    who: 'bearer',
    answer: of(200, 'ModelPatches'),
  },
  list('/api/productions/:productionId/materials', 'Presets, the newest version of each', 'MaterialList'),
  {
    method: 'post',
    path: '/api/productions/:productionId/materials',
    summary: 'Publish a preset of the production',
    who: 'bearer',
    body: 'PresetRequest',
    answer: of(201, 'MaterialPreset'),
    problems: [400],
  },
  {
    method: 'post',
    path: '/api/materials/:materialId/versions',
    summary: 'Publish the next version of a production’s preset',
    who: 'bearer',
    body: 'PresetVersionRequest',
    answer: of(201, 'MaterialPreset'),
    problems: [400, 409],
  },
  list('/api/productions/:productionId/scenes', 'Scenes of a production, newest first', 'SceneList'),
  {
    method: 'post',
    path: '/api/productions/:productionId/scenes',
    summary: 'Make a scene with its revision 1',
    who: 'bearer',
    body: 'SceneRequest',
    answer: of(201, 'Scene'),
    problems: [400],
  },
  {
    method: 'get',
    path: '/api/scenes/:sceneId',
    summary: 'A scene and its newest revision',
    who: 'bearer',
    answer: of(200, 'Scene'),
  },
  list('/api/scenes/:sceneId/revisions', 'Revisions of a scene, newest first', 'RevisionList'),
  {
    method: 'post',
    path: '/api/scenes/:sceneId/revisions',
    summary: 'Save a revision on top of the newest',
    who: 'bearer',
    body: 'RevisionRequest',
    answer: of(201, 'Revision'),
    problems: [400, 409],
  },
  {
    method: 'get',
    path: '/api/revisions/:revisionId',
    summary: 'A revision with its document',
    who: 'bearer',
    answer: of(200, 'Revision'),
  },
  list('/api/productions/:productionId/runs', 'Runs of a production, newest first', 'RunList'),
  list('/api/scenes/:sceneId/runs', 'Runs of a scene, newest first', 'RunList'),
  {
    method: 'post',
    path: '/api/scenes/:sceneId/runs',
    summary: 'Start a run of a revision',
    who: 'bearer',
    body: 'RunRequest',
    answer: of(201, 'Run'),
    problems: [400],
  },
  {
    method: 'get',
    path: '/api/runs/:runId',
    summary: 'A run and what has arrived for it',
    who: 'bearer',
    answer: of(200, 'Run'),
  },
  {
    method: 'delete',
    path: '/api/runs/:runId',
    summary: 'Throw an unfinished run away',
    who: 'bearer',
    answer: of(204, 'nothing'),
    problems: [409],
  },
  {
    method: 'post',
    path: '/api/runs/:runId/complete',
    summary: 'Complete a run of which everything has arrived',
    who: 'bearer',
    body: 'RunCompleteRequest',
    answer: of(200, 'Run'),
    problems: [400, 409, 413],
  },
  {
    method: 'get',
    path: '/api/runs/:runId/traces',
    summary: 'Values by frame of a complete run',
    who: 'bearer',
    answer: of(200, 'RunTraces'),
  },
  bytes('/api/runs/:runId/recipe', 'the surface recipe'),
  sendBytes('/api/runs/:runId/recipe', 'the surface recipe'),
  bytes('/api/runs/:runId/chunks/:index', 'a chunk of frames'),
  sendBytes('/api/runs/:runId/chunks/:index', 'the next chunk of frames'),
  bytes('/api/runs/:runId/checkpoint', 'the newest solver state'),
  {
    ...sendBytes('/api/runs/:runId/checkpoint', 'the newest solver state'),
    query: [{ name: 'frame', type: 'integer' }],
  },
  list('/api/audit', 'What happened, newest first; for administrators', 'AuditList'),
];
