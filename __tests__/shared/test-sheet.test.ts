import { likelyExtension, readTestSheet, testPoints } from '../../shared/test-sheet';

test('commas, semicolons with decimal commas, tabs and spaces are told apart; headings are kept', () => {
  const rows = [
    [1, 0],
    [1.1, 0.125],
    [1.2, 0.25],
  ];
  const english = readTestSheet('stretch,stress MPa\n1.0,0\n1.1,0.125\n1.2,0.25\n');
  expect(english).toEqual({ rows, skipped: 1, headings: ['stretch', 'stress MPa'] });
  expect(readTestSheet('\uFEFFDehnung;Spannung\r\n1,0;0\r\n1,1;0,125\r\n1,2;0,25').rows).toEqual(rows);
  expect(readTestSheet('1,0\t0\n1,1\t0,125\n1,2\t0,25').rows).toEqual(rows);
  expect(readTestSheet('  1.0   0\n1.1 0.125\n\n1.2 0.25').rows).toEqual(rows);
});

test('stretch, strain and percent become stretch; rest and pushing are left out; stress becomes pascals', () => {
  const sheet = (text: string) => readTestSheet(text);
  const expected = [
    [1.1, 1e5],
    [1.5, 4e5],
    [2, 6e5],
  ];
  const close = (points: [number, number][]) =>
    points.forEach((point, k) => point.forEach((value, i) => expect(value).toBeCloseTo(expected[k]![i]!, 6)));
  close(testPoints(sheet('1 0\n1.1 0.1\n1.5 0.4\n2 0.6\n0.9 -1'), 'stretch', 'MPa'));
  close(testPoints(sheet('0 0\n0.1 100\n0.5 400\n1 600'), 'strain', 'kPa'));
  close(testPoints(sheet('0 0\n10 100000\n50 400000\n100 600000'), 'percent', 'Pa'));
});

test('the unit of the first column is guessed from its heading or its numbers', () => {
  expect(likelyExtension(readTestSheet('strain %,stress\n1,1\n2,2\n3,3'))).toBe('percent');
  expect(likelyExtension(readTestSheet('0,0\n50,1\n120,2'))).toBe('percent');
  expect(likelyExtension(readTestSheet('1,0\n1.5,1\n2,2'))).toBe('stretch');
  expect(likelyExtension(readTestSheet('0,0\n0.5,1\n1,2'))).toBe('strain');
});

test('what is no table is refused in words', () => {
  expect(() => readTestSheet('\n \n')).toThrow('The file is empty');
  expect(() => readTestSheet('a letter\nto somebody\nabout nothing')).toThrow('No table was found');
  expect(() => readTestSheet('1,1\n2,2')).toThrow('No table was found');
  expect(() => readTestSheet(Array(20_002).fill('1,1').join('\n'))).toThrow('more than 20000 rows');
  expect(() => testPoints(readTestSheet('0,0\n0.1,1\n0.5,2'), 'stretch', 'MPa')).toThrow('which unit');
  expect(() => testPoints(readTestSheet('10,1\n100,2\n300,3'), 'strain', 'MPa')).toThrow('twentyfold');
});
