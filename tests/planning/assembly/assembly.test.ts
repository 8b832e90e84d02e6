import { describe, expect, it } from 'vitest';
import { spread } from '../../../src/planning/assembly/spread.js';

const rod = (direction: [number, number, number], travel: number, aside: number) => ({ direction, travel, aside });

describe('spreading struts into their sockets', () => {
  it('one strut slides in along itself', () => {
    expect(spread([rod([0, 0, 1], 14, 5)]).ratio).toBeLessThan(1e-3);
  });

  it('two struts at an angle 2a need travel x tan(a) aside each (plane geometry)', () => {
    const a = Math.PI / 6;
    const found = spread([rod([Math.sin(a), 0, Math.cos(a)], 12, 10), rod([-Math.sin(a), 0, Math.cos(a)], 12, 10)]);
    expect(found.ratio * 10).toBeCloseTo(12 * Math.tan(a), 1);
  });

  it('opposite struts can never both enter: no move draws back from both', () => {
    expect(spread([rod([1, 0, 0], 10, 100), rod([-1, 0, 0], 10, 100)]).ratio).toBe(Number.POSITIVE_INFINITY);
  });

  it('turning the figure changes nothing', () => {
    const struts = [rod([0.6, 0, 0.8], 10, 4), rod([0, 0.6, 0.8], 12, 5), rod([-0.6, 0, 0.8], 9, 6)];
    const turned = struts.map((s) => rod([s.direction[1], s.direction[2], s.direction[0]], s.travel, s.aside));
    expect(spread(turned).ratio).toBeCloseTo(spread(struts).ratio, 2);
  });
});
