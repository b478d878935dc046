import { timeCode } from '../../shared/time-code';

// SMPTE ST 12-1:2014: drop-frame counting at 30000/1001 frames a second.
test.each([
  [0, '00:00:00;00'], [1799, '00:00:59;29'], [1800, '00:01:00;02'], [1801, '00:01:00;03'], [3597, '00:01:59;29'],
  [3598, '00:02:00;02'], [17981, '00:09:59;29'], [17982, '00:10:00;00'], [107891, '00:59:59;29'],
  [107892, '01:00:00;00'], [2589407, '23:59:59;29'],
])('frame %d at 29.97 is %s', (frame, code) => {
  expect(timeCode(frame, 30000 / 1001)).toBe(code);
  expect(timeCode(frame, 29.97)).toBe(code);
}); // prettier-ignore

test('the labels ;00 and ;01 are never given in a minute that drops them, and no label twice', () => {
  const codes = Array.from({ length: 20_000 }, (_, frame) => timeCode(frame, 30000 / 1001));
  expect(new Set(codes).size).toBe(codes.length);
  expect(codes.filter((code) => /:0[1-9]:00;0[01]$/.test(code))).toEqual([]);
});

test.each([
  [101, 24, '00:00:04:05'],
  [90_000, 25, '01:00:00:00'],
  [1800, 30, '00:01:00:00'],
  [1440, 24000 / 1001, '00:01:00:00'],
  [3600, 60000 / 1001, '00:01:00;04'],
])('frame %d at %d frames a second is %s', (frame, rate, code) => {
  expect(timeCode(frame, rate)).toBe(code);
});
