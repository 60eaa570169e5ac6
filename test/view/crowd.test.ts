// What labels of the map would cover, found by squares, is what looking at every box finds.
import { expect, it } from 'vitest';
import { createCrowd } from '../../src/view/map/crowd.ts';
import type { Box } from '../../src/view/map/shape.ts';

it('finds all that a box covers, once for each box there', () => {
  let seed = 7;
  const next = (): number => (seed = (seed * 48_271) % 2_147_483_647) / 2_147_483_647;
  const box = (): Box => {
    const [left, top] = [next() * 760 - 100, next() * 800 - 100];
    return { left, top, right: left + next() * 200, bottom: top + next() * 150 };
  };
  const boxes = Array.from({ length: 200 }, box);
  const crowd = createCrowd();
  for (const one of boxes) crowd.add(one);
  for (const asked of Array.from({ length: 100 }, box)) {
    const covered = boxes.map((other) => {
      const wide = Math.min(asked.right, other.right) - Math.max(asked.left, other.left);
      const high = Math.min(asked.bottom, other.bottom) - Math.max(asked.top, other.top);
      return wide > 0 && high > 0 ? wide * high : 0;
    });
    expect(crowd.covered(asked)).toBeCloseTo(
      covered.reduce((a, b) => a + b),
      6,
    );
  }
});
