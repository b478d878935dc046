import type { Kernels } from './kernels';
import { plainKernels } from './plain';

/** The fastest kernels that this engine can run. */
export const bestKernels = (): Kernels => plainKernels;
