/** The product's words for roles and states, and the caution that goes wherever a number can leave. */
export const ROLES = ['lead', 'technical-director', 'artist'] as const;
export type Role = (typeof ROLES)[number];

export const ROLE_WORDS: Record<Role | 'administrator', string> = {
  administrator: 'administrator',
  lead: 'lead',
  'technical-director': 'TD',
  artist: 'artist',
};

export const LAW_WORDS = {
  'stable-neo-hookean': 'stable neo-Hookean',
  'neo-hookean-a': 'neo-Hookean A',
  'neo-hookean-b': 'neo-Hookean B',
} as const;

export const CAUTION =
  'A preview for pictures. It is no basis for sizing a structure, a rig, an inflatable or anything that carries ' +
  'or stands over people. Such work follows local codes and belongs to licensed engineers.';

export const GRAVITY = 9.80665;
