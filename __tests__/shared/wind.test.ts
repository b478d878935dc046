import { BEAUFORT, beaufortOf, beaufortSpeed, windWords } from '../../shared/wind';

// WMO No. 306, Manual on Codes, code table 1100: bands in m/s.
const BANDS: [number, string, number, number][] = [
  [0, 'calm', 0, 0.2],
  [1, 'light air', 0.3, 1.5],
  [2, 'light breeze', 1.6, 3.3],
  [3, 'gentle breeze', 3.4, 5.4],
  [4, 'moderate breeze', 5.5, 7.9],
  [5, 'fresh breeze', 8, 10.7],
  [6, 'strong breeze', 10.8, 13.8],
  [7, 'near gale', 13.9, 17.1],
  [8, 'gale', 17.2, 20.7],
  [9, 'strong gale', 20.8, 24.4],
  [10, 'storm', 24.5, 28.4],
  [11, 'violent storm', 28.5, 32.6],
  [12, 'hurricane', 32.7, 80],
];

test.each(BANDS)('Beaufort %d, %s, from %d to %d m/s', (number, name, low, high) => {
  expect(BEAUFORT[number]!.name).toBe(name);
  expect([low, high].map(beaufortOf)).toEqual([number, number]);
  expect(windWords((low + high) / 2)).toBe(`${name}, Beaufort ${number}`);
});

// The same table's formula: 0.836 B^1.5.
test.each([
  [1, 0.836], [3, 4.344], [6, 12.287], [12, 34.752],
])('the middle of Beaufort %d is %d m/s, and is read back as that number', (number, speed) => {
  expect(beaufortSpeed(number)).toBeCloseTo(speed, 3);
  expect(beaufortOf(beaufortSpeed(number))).toBe(number);
}); // prettier-ignore
