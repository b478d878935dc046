import { energyKept } from '../../../solver/time/numerical-damping';

// Closed form of backward Euler: T. J. R. Hughes, The Finite Element Method (1987), ch. 9: (1 + ω²h²)⁻¹ a step.
it.each([
  [2, 1 / 24],
  [2, 1 / 240],
  [6, 1 / 48],
])('backward Euler leaves a wobble of %d Hz at steps of %d s what the closed form says', (hertz, dt) => {
  const wh = 2 * Math.PI * hertz * dt;
  const expected = (1 + wh * wh) ** (-1 / dt);
  expect(energyKept('backward-euler', hertz, dt) / expected).toBeCloseTo(1, 6);
});

// Common practice: the methods of second order keep far more than backward Euler; TR-BDF2 and HHT most, with halved
// steps about an eighth (BDF2, TR-BDF2: third order in the step) of the loss, and never more than there was.
it('second-order methods keep more, and lose an eighth with half the step', () => {
  const lost = (method: 'bdf2' | 'tr-bdf2' | 'hht', dt: number) => 1 - energyKept(method, 1, dt);
  for (const method of ['bdf2', 'tr-bdf2', 'hht'] as const) {
    expect(lost(method, 1 / 96)).toBeGreaterThan(0);
    expect(lost(method, 1 / 96)).toBeLessThan(0.2 * (1 - energyKept('backward-euler', 1, 1 / 96)));
  }
  for (const method of ['bdf2', 'tr-bdf2'] as const) {
    expect(lost(method, 1 / 96) / lost(method, 1 / 192)).toBeGreaterThan(6.5);
    expect(lost(method, 1 / 96) / lost(method, 1 / 192)).toBeLessThan(9.5);
  }
  expect(lost('tr-bdf2', 1 / 96)).toBeLessThan(lost('bdf2', 1 / 96));
});
