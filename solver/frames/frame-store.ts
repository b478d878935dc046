/**
 * Chunks of a run: poses as part coefficients. Every chunk stands alone. Layout, little endian:
 *
 *   0  magic "LLFS"      4  version u8 (1)     5  mode u8 (0 lossless, 1 quantised)   6  u16 (0)
 *   8  unknowns a pose u32     12  first pose u32     16  poses u32     20  u32 (0)     24  quantum f64
 *   32 payload
 *
 * Lossless: the f64 bytes of all poses, plane by plane (all first bytes, then all second bytes …), each pose taken as
 * the exclusive-or with the one before. Quantised: multiples of the quantum, predicted by second differences in time,
 * zigzag variable-length integers. Compression is left to a deflate outside.
 */

const MAGIC = 0x53464c4c; // "LLFS"
const VERSION = 1;
const HEADER = 32;
const MAX_UNKNOWNS = 1_000_000;
const MAX_POSES = 4096;

export type FrameMode = 'lossless' | 'quantised';

export interface DecodedChunk {
  first: number;
  unknowns: number;
  mode: FrameMode;
  poses: Float64Array[];
}

/** A chunk that cannot be read; the message says what is wrong with it. */
export class ChunkFault extends Error {
  override readonly name = 'ChunkFault';
}

/**
 * The quantum at which no place of the surface moves by more than `bound` (m): a place is Σ N c, so its error is at
 * most half a quantum times Σ|N|. `largestRow` is the largest Σ|N| over the drawn rows.
 */
export const quantumFor = (bound: number, largestRow: number): number => (2 * bound) / largestRow;

export function encodeChunk(
  poses: readonly Float64Array[],
  first: number,
  options: { mode: 'lossless' } | { mode: 'quantised'; quantum: number },
): Uint8Array {
  const unknowns = poses[0]?.length ?? 0;
  if (poses.length === 0 || poses.length > MAX_POSES || poses.some((pose) => pose.length !== unknowns)) {
    throw new RangeError(`A chunk holds 1 to ${MAX_POSES} poses of one length.`);
  }
  const quantum = options.mode === 'quantised' ? options.quantum : 0;
  if (options.mode === 'quantised' && !(quantum > 0 && Number.isFinite(quantum))) {
    throw new RangeError(`A quantum is a length greater than 0, not ${quantum}.`);
  }
  const payload = options.mode === 'quantised' ? packQuantised(poses, quantum) : packLossless(poses);
  const bytes = new Uint8Array(HEADER + payload.length);
  const view = new DataView(bytes.buffer);
  view.setUint32(0, MAGIC, true);
  view.setUint8(4, VERSION);
  view.setUint8(5, options.mode === 'quantised' ? 1 : 0);
  view.setUint32(8, unknowns, true);
  view.setUint32(12, first, true);
  view.setUint32(16, poses.length, true);
  view.setFloat64(24, quantum, true);
  bytes.set(payload, HEADER);
  return bytes;
}

/** Throws ChunkFault for anything that `encodeChunk` did not write. */
export function decodeChunk(bytes: Uint8Array): DecodedChunk {
  if (bytes.length < HEADER) throw new ChunkFault(`A chunk has at least ${HEADER} bytes, this one ${bytes.length}.`);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (view.getUint32(0, true) !== MAGIC) throw new ChunkFault('These bytes are not a chunk of a run.');
  if (view.getUint8(4) !== VERSION)
    throw new ChunkFault(`This chunk is of version ${view.getUint8(4)}; ${VERSION} can be read.`);
  const mode = view.getUint8(5);
  const unknowns = view.getUint32(8, true);
  const first = view.getUint32(12, true);
  const count = view.getUint32(16, true);
  const quantum = view.getFloat64(24, true);
  if (mode > 1 || unknowns < 1 || unknowns > MAX_UNKNOWNS || count < 1 || count > MAX_POSES) {
    throw new ChunkFault(`The chunk's header makes no sense (mode ${mode}, ${unknowns} unknowns, ${count} poses).`);
  }
  const payload = bytes.subarray(HEADER);
  if (mode === 0) {
    if (payload.length !== 8 * unknowns * count) {
      throw new ChunkFault(`The chunk has ${payload.length} bytes of poses; ${8 * unknowns * count} were expected.`);
    }
    return { first, unknowns, mode: 'lossless', poses: unpackLossless(payload, unknowns, count) };
  }
  if (!(quantum > 0) || !Number.isFinite(quantum)) throw new ChunkFault(`The chunk's quantum is ${quantum}.`);
  // Every number takes at least a byte: this refuses absurd counts before anything is allocated.
  if (payload.length < unknowns * count) throw new ChunkFault('The chunk ends before its poses do.');
  return { first, unknowns, mode: 'quantised', poses: unpackQuantised(payload, unknowns, count, quantum) };
}

function packQuantised(poses: readonly Float64Array[], quantum: number): Uint8Array {
  const unknowns = poses[0]!.length;
  let out = new Uint8Array(2 * unknowns * poses.length + 16);
  let at = 0;
  const before = new Float64Array(unknowns);
  const earlier = new Float64Array(unknowns);
  poses.forEach((pose, k) => {
    for (let u = 0; u < unknowns; u++) {
      const value = Math.round(pose[u]! / quantum);
      if (!Number.isFinite(value) || Math.abs(value) > 2 ** 50) {
        throw new RangeError(`Coefficient ${u} of pose ${k} (${pose[u]}) is too large for the quantum ${quantum}.`);
      }
      const predicted = k === 0 ? 0 : k === 1 ? before[u]! : 2 * before[u]! - earlier[u]!;
      const residual = value - predicted;
      let code = residual >= 0 ? 2 * residual : -2 * residual - 1;
      if (at + 9 > out.length) {
        const larger = new Uint8Array(2 * out.length);
        larger.set(out);
        out = larger;
      }
      while (code >= 128) {
        out[at++] = (code % 128) + 128;
        code = Math.floor(code / 128);
      }
      out[at++] = code;
      earlier[u] = before[u]!;
      before[u] = value;
    }
  });
  return out.slice(0, at);
}

function unpackQuantised(payload: Uint8Array, unknowns: number, count: number, quantum: number): Float64Array[] {
  const poses: Float64Array[] = [];
  const before = new Float64Array(unknowns);
  const earlier = new Float64Array(unknowns);
  let at = 0;
  for (let k = 0; k < count; k++) {
    const pose = new Float64Array(unknowns);
    for (let u = 0; u < unknowns; u++) {
      let code = 0;
      let scale = 1;
      for (;;) {
        if (at >= payload.length || scale > 2 ** 56) throw new ChunkFault('The chunk ends in the middle of a number.');
        const byte = payload[at++]!;
        code += (byte & 127) * scale;
        if (byte < 128) break;
        scale *= 128;
      }
      const residual = code % 2 === 0 ? code / 2 : -(code + 1) / 2;
      const predicted = k === 0 ? 0 : k === 1 ? before[u]! : 2 * before[u]! - earlier[u]!;
      const value = predicted + residual;
      earlier[u] = before[u]!;
      before[u] = value;
      pose[u] = value * quantum;
    }
    poses.push(pose);
  }
  if (at !== payload.length) throw new ChunkFault(`${payload.length - at} bytes follow the last pose.`);
  return poses;
}

function packLossless(poses: readonly Float64Array[]): Uint8Array {
  const unknowns = poses[0]!.length;
  const total = unknowns * poses.length;
  const out = new Uint8Array(8 * total);
  const before = new Uint8Array(8 * unknowns);
  poses.forEach((pose, k) => {
    const raw = new Uint8Array(pose.buffer, pose.byteOffset, 8 * unknowns);
    for (let u = 0; u < unknowns; u++) {
      for (let b = 0; b < 8; b++) {
        out[b * total + k * unknowns + u] = raw[8 * u + b]! ^ before[8 * u + b]!;
        before[8 * u + b] = raw[8 * u + b]!;
      }
    }
  });
  return out;
}

function unpackLossless(payload: Uint8Array, unknowns: number, count: number): Float64Array[] {
  const total = unknowns * count;
  const poses: Float64Array[] = [];
  const before = new Uint8Array(8 * unknowns);
  for (let k = 0; k < count; k++) {
    const raw = new Uint8Array(8 * unknowns);
    for (let u = 0; u < unknowns; u++) {
      for (let b = 0; b < 8; b++) raw[8 * u + b] = payload[b * total + k * unknowns + u]! ^ before[8 * u + b]!;
    }
    before.set(raw);
    poses.push(new Float64Array(raw.buffer));
  }
  return poses;
}
