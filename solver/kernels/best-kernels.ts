import type { Kernels } from './kernels';
import { plainKernels } from './plain';
import { wasmKernels } from './wasm';

/** The fastest kernels that this engine can run. */
export const bestKernels = (): Kernels => wasmKernels() ?? plainKernels;
