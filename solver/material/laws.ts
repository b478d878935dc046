import type { MaterialLaw } from '../scene';
import type { Law } from './law';
import { neoHookeanA } from './neo-hookean-a';
import { neoHookeanB } from './neo-hookean-b';
import { stableNeoHookean } from './stable-neo-hookean';

const LAWS: Record<MaterialLaw, Law> = {
  'stable-neo-hookean': stableNeoHookean,
  'neo-hookean-a': neoHookeanA,
  'neo-hookean-b': neoHookeanB,
};

export const lawOf = (name: MaterialLaw): Law => LAWS[name];
