import { Gate } from '../../server/models/gate';

test('never more than the allowed number at once, all in the order they came, failures included', async () => {
  const gate = new Gate(2);
  const order: number[] = [];
  let running = 0;
  let most = 0;
  const task = (i: number) =>
    gate.pass(async () => {
      running += 1;
      most = Math.max(most, running);
      order.push(i);
      await new Promise((resolve) => setImmediate(resolve));
      running -= 1;
      if (i % 3 === 0) throw new Error('expected');
    });
  const outcomes = await Promise.allSettled(Array.from({ length: 9 }, (_, i) => task(i)));
  expect(most).toBe(2);
  expect(order).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8]);
  expect(outcomes.filter(({ status }) => status === 'rejected')).toHaveLength(3);
});
