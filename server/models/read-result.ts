import type { ImportReport, Model } from '../../shared/wire/models';

/** What reading a file yields; plain data and bytes, so that it can cross from the child process. */
export interface ReadResult {
  format: Model['format'];
  patchCount: number;
  /** In the file's unit. */
  bounds: Model['bounds'];
  report: ImportReport;
  /** `modelPatchesSchema` as JSON, gzipped */
  patches: Uint8Array;
}

/** Parent → child. */
export interface ReadRequest {
  bytes: Uint8Array;
  fileName: string;
}

/** Child → parent. `unreadable` carries a sentence for the person. */
export type ReadAnswer = { kind: 'read'; result: ReadResult } | { kind: 'unreadable'; detail: string };
