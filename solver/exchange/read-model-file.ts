import { readBezierPatchText } from './bezier-patch-text';
import type { ImportResult } from './import-result';
import { readStep } from './step-reader';
import { UnreadableModelError } from './unreadable-model-error';

/** Bytes or letters that tell what a file is. */
const HEAD = 4096;
/** The start section of IGES: letter S and a line number in the columns 73 to 80. */
const IGES_START = /^[^\r\n]{72}S[ 0]*1\s/;

/**
 * Reads a model file; what it is is decided by its content, the name only helps the wording. Patches are in the
 * file's unit. Throws UnreadableModelError with a sentence for the person who brought it.
 */
export function readModelFile(bytes: Uint8Array, fileName: string): ImportResult {
  if (bytes.length === 0) throw new UnreadableModelError('This file is empty. Ask for it again.');
  const first = new TextDecoder('latin1').decode(bytes.subarray(0, HEAD));
  // eslint-disable-next-line no-control-regex -- bytes that no text file holds tell a binary one
  if (/[\x00-\x08\x0e-\x1f]/.test(first)) {
    throw new UnreadableModelError(
      `${quoted(fileName)} is not a text file. STEP files and Bézier-patch text can be read.`,
    );
  }
  const text = new TextDecoder('utf-8').decode(bytes);
  const head = text.slice(0, HEAD);
  if (/^\s*(\/\*[\s\S]*?\*\/\s*)*ISO-10303-21/.test(head)) return readStep(text);
  if (IGES_START.test(head)) {
    throw new UnreadableModelError(
      `${quoted(fileName)} is an IGES file. Export the model as STEP with B-spline surfaces.`,
    );
  }
  if (/^\s*\d+(\s+[-+.\d]|\s*$)/.test(head)) return readBezierPatchText(text);
  throw new UnreadableModelError(
    `${quoted(fileName)} is neither STEP nor Bézier-patch text. Export the model as STEP with B-spline surfaces.`,
  );
}

const quoted = (name: string) => `“${name.length > 60 ? `${name.slice(0, 57)}…` : name}”`;
