import { ChunkFault, decodeChunk, encodeChunk, quantumFor } from '../../../solver/frames/frame-store';
import { seededRandom } from '../../../solver/math/random';

/** Poses that move smoothly: a slow swing of every coefficient about its rest. */
function motion(count: number, unknowns: number, scale = 1): Float64Array[] {
  const random = seededRandom(5);
  const rest = Float64Array.from({ length: unknowns }, () => scale * (random() - 0.5));
  const phase = Float64Array.from({ length: unknowns }, () => 6 * random());
  return Array.from({ length: count }, (_, k) =>
    rest.map((value, u) => value + 0.05 * scale * Math.sin(phase[u]! + 0.2 * k)),
  );
}

const bits = (poses: readonly Float64Array[]) => poses.map((pose) => Buffer.from(pose.buffer).toString('hex'));

describe('lossless', () => {
  test.each([1, 2, 24])('%d poses come back bit for bit', (count) => {
    const poses = motion(count, 37);
    poses[0]![3] = -0;
    poses[count - 1]![4] = 5e-324;
    poses[count - 1]![5] = -1.7976931348623157e308;
    const chunk = decodeChunk(encodeChunk(poses, 48, { mode: 'lossless' }));
    expect(chunk).toMatchObject({ first: 48, unknowns: 37, mode: 'lossless' });
    expect(bits(chunk.poses)).toEqual(bits(poses));
  });

  test('a pose that is a view into a larger array is kept as it is', () => {
    const large = Float64Array.from({ length: 40 }, (_, k) => Math.sqrt(k));
    const [pose] = decodeChunk(encodeChunk([large.subarray(7, 29)], 0, { mode: 'lossless' })).poses;
    expect([...pose!]).toEqual([...large.subarray(7, 29)]);
  });
});

describe('quantised', () => {
  test.each([1e-3, 1, 250])('at scale %d no place moves by more than the bound', (scale) => {
    const poses = motion(24, 40, scale);
    // Rows as of a drawn surface: values of both signs, Σ|N| up to `largest`.
    const random = seededRandom(11);
    const rows = Array.from({ length: 200 }, () => Float64Array.from({ length: 40 }, () => 0.5 * (random() - 0.5)));
    const magnitude = (row: Float64Array) => row.reduce((sum, value) => sum + Math.abs(value), 0);
    const bound = 1e-4 * scale;
    const quantum = quantumFor(bound, Math.max(...rows.map(magnitude)));
    const chunk = decodeChunk(encodeChunk(poses, 0, { mode: 'quantised', quantum }));
    let worst = 0;
    poses.forEach((pose, k) => {
      for (const row of rows) {
        const error = row.reduce((sum, value, u) => sum + value * (chunk.poses[k]![u]! - pose[u]!), 0);
        worst = Math.max(worst, Math.abs(error));
      }
      for (let u = 0; u < 40; u++) {
        expect(Math.abs(chunk.poses[k]![u]! - pose[u]!)).toBeLessThanOrEqual(quantum * 0.5000001);
      }
    });
    expect(worst).toBeLessThanOrEqual(bound);
    // The quantum is not needlessly fine: errors come within a factor of the bound.
    expect(worst).toBeGreaterThan(0.05 * bound);
  });

  test('a row that gathers every error in one sense reaches the bound and does not pass it', () => {
    const quantum = quantumFor(1e-3, 8);
    const pose = new Float64Array(8).fill(quantum * 12.4999);
    const [back] = decodeChunk(encodeChunk([pose], 0, { mode: 'quantised', quantum })).poses;
    const moved = back!.reduce((sum, value, u) => sum + Math.abs(value - pose[u]!), 0);
    expect(moved).toBeLessThanOrEqual(1e-3);
    expect(moved).toBeGreaterThan(0.99e-3);
  });

  test('an even motion costs a byte a number from the third pose on', () => {
    const poses = Array.from({ length: 24 }, (_, k) => Float64Array.from({ length: 100 }, (__, u) => 10 * k * u + 7));
    const bytes = encodeChunk(poses, 0, { mode: 'quantised', quantum: 1 });
    expect(bytes.length).toBeLessThan(32 + 2 * 3 * 100 + 22 * 100);
  });

  test('jumps as large as the format allows come back', () => {
    const poses = [0, 2 ** 50, -(2 ** 50), 2 ** 50, -(2 ** 50)].map((value) => Float64Array.of(value, 1));
    expect(decodeChunk(encodeChunk(poses, 0, { mode: 'quantised', quantum: 1 })).poses).toEqual(poses);
  });

  test.each([NaN, Infinity, 2 ** 51])('a coefficient of %d is refused by its place', (value) => {
    const poses = motion(2, 5);
    poses[1]![3] = value;
    expect(() => encodeChunk(poses, 0, { mode: 'quantised', quantum: 1 })).toThrow(/^Coefficient 3 of pose 1 /);
  });

  test.each([0, -1, NaN, Infinity])('a quantum of %d is refused', (quantum) => {
    expect(() => encodeChunk(motion(1, 5), 0, { mode: 'quantised', quantum })).toThrow(RangeError);
  });
});

describe('poses of unlike lengths, none, or too many', () => {
  const refused = 'A chunk holds 1 to 4096 poses of one length.';
  test.each([
    [[]],
    [[new Float64Array(3), new Float64Array(4)]],
    [Array.from({ length: 4097 }, () => new Float64Array(1))],
  ])('%#', (poses) => {
    expect(() => encodeChunk(poses, 0, { mode: 'lossless' })).toThrow(refused);
  });
});

describe('damaged chunks are refused with what is wrong', () => {
  const quantised = encodeChunk(motion(24, 30), 24, { mode: 'quantised', quantum: 1e-5 });
  const lossless = encodeChunk(motion(24, 30), 24, { mode: 'lossless' });
  const changed = (bytes: Uint8Array, at: number, ...values: number[]) => {
    const copy = bytes.slice();
    copy.set(values, at);
    return copy;
  };

  test.each([
    ['nothing', new Uint8Array(0), 'at least 32 bytes, this one 0'],
    ['half a header', quantised.slice(0, 20), 'at least 32 bytes, this one 20'],
    ['another kind of file', changed(quantised, 0, 0x50, 0x4b), 'not a chunk of a run'],
    ['a later version', changed(quantised, 4, 9), 'version 9; 1 can be read'],
    ['an unknown mode', changed(quantised, 5, 7), 'mode 7'],
    ['no unknowns', changed(quantised, 8, 0, 0, 0, 0), '0 unknowns'],
    ['too many unknowns', changed(quantised, 8, 255, 255, 255, 255), '4294967295 unknowns'],
    ['too many poses', changed(quantised, 16, 255, 255, 0, 0), '65535 poses'],
    ['more poses than bytes', changed(quantised, 16, 0, 16, 0, 0), 'ends before its poses do'],
    ['a quantum of zero', changed(quantised, 24, 0, 0, 0, 0, 0, 0, 0, 0), 'quantum is 0'],
    ['an infinite quantum', changed(quantised, 24, 0, 0, 0, 0, 0, 0, 0xf0, 0x7f), 'quantum is Infinity'],
    ['a cut end', quantised.slice(0, -1), 'ends in the middle of a number'],
    ['bytes too many', Uint8Array.of(...quantised, 0), '1 bytes follow the last pose'],
    ['an endless number', changed(quantised, 32, ...new Array<number>(12).fill(255)), 'in the middle of a number'],
    ['a cut end, lossless', lossless.slice(0, -1), '5759 bytes of poses; 5760 were expected'],
    ['bytes too many, lossless', Uint8Array.of(...lossless, 1), '5761 bytes of poses'],
  ])('%s', (_, bytes, message) => {
    expect(() => decodeChunk(bytes)).toThrow(ChunkFault);
    expect(() => decodeChunk(bytes)).toThrow(message);
  });

  test('any single byte changed is either refused or gives poses of the promised shape', () => {
    const random = seededRandom(3);
    for (let round = 0; round < 2000; round++) {
      const bytes = changed(quantised, Math.floor(random() * quantised.length), Math.floor(256 * random()));
      try {
        const chunk = decodeChunk(bytes);
        expect(chunk.poses.every((pose) => pose.length === chunk.unknowns)).toBe(true);
      } catch (error) {
        expect(error).toBeInstanceOf(ChunkFault);
      }
    }
  });

  test('a chunk inside a larger buffer reads the same', () => {
    const larger = new Uint8Array(quantised.length + 24);
    larger.set(quantised, 13);
    expect(decodeChunk(larger.subarray(13, 13 + quantised.length))).toEqual(decodeChunk(quantised));
  });
});
