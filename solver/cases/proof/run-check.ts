import type { Kernels } from '../../kernels/kernels';
import { cantileverCheck } from './cantilever';
import { elasticaCheck } from './elastica';
import { energy } from './energy';
import { patchTest } from './patch-test';
import type { ProofResult } from './proof-result';
import { twist } from './twist';
import { vibration } from './vibration';

const CHECKS = {
  patch: patchTest,
  cantilever: cantileverCheck,
  elastica: elasticaCheck,
  twist,
  vibration,
  energy,
} satisfies Record<string, (kernels: Kernels, onProgress: (share: number) => void) => ProofResult>;

export type ProofCheck = keyof typeof CHECKS;
export const PROOF_CHECKS = Object.keys(CHECKS) as ProofCheck[];

/** Computes one check of the proof sheet, now. */
export const runProofCheck = (
  check: ProofCheck,
  kernels: Kernels,
  onProgress: (share: number) => void = () => {},
): ProofResult => CHECKS[check](kernels, onProgress);
