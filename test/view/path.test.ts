// Lines as short path texts: what a reader of the path draws must be the places, to a tenth of a pixel.
import { describe, expect, it } from 'vitest';
import { areaWithin, pathThrough, type Place } from '../../src/view/path.ts';
import { placesOf } from './places-of.ts';

describe('a path through many places', () => {
  it('is written from place to place, as briefly as can be', () => {
    expect(pathThrough([[6, 86.72], [16.5, 87.3], [16, 80], [16, 80]])).toBe('m6 86.7 10.5 .6-.5-7.3 0 0'); // prettier-ignore
    expect(areaWithin([[0, 0], [3, 0], [3, -0.04]])).toBe('m0 0 3 0 0 0z'); // prettier-ignore
    expect([pathThrough([]), areaWithin([])]).toEqual(['', '']);
  });

  it('stays within half a tenth of every place, however long it is', () => {
    const places = Array.from({ length: 500 }, (_, i): Place => [i * 2.6745, 300 * Math.sin(i * 0.37) + 0.049 * i]);
    const drawn = placesOf(pathThrough(places));
    expect(drawn.length).toBe(places.length);
    places.forEach(([x, y], i) => {
      expect(Math.abs(drawn[i]![0] - x)).toBeLessThan(0.0501);
      expect(Math.abs(drawn[i]![1] - y)).toBeLessThan(0.0501);
    });
  });
});
