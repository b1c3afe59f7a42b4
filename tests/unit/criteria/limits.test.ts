import { describe, expect, it } from 'vitest';
import { judgeBounds } from '../../../sim/criteria/limits.js';

describe('judging a value by its limit', () => {
  it('leaves a margin below an upper limit, and as a share of it', () => {
    expect(judgeBounds(3, { atMost: 4 })).toEqual({ margin: 1, marginShare: 0.25, passes: true });
    expect(judgeBounds(5, { atMost: 4 })).toEqual({ margin: -1, marginShare: -0.25, passes: false });
  });

  it('leaves a margin above a lower limit', () => {
    expect(judgeBounds(5, { atLeast: 4 })).toEqual({ margin: 1, marginShare: 0.25, passes: true });
    expect(judgeBounds(3, { atLeast: 4 })).toEqual({ margin: -1, marginShare: -0.25, passes: false });
  });

  it('takes the nearer limit of a band', () => {
    expect(judgeBounds(9, { between: [4, 10] })).toEqual({ margin: 1, marginShare: 0.1, passes: true });
    expect(judgeBounds(5, { between: [4, 10] })).toEqual({ margin: 1, marginShare: 0.25, passes: true });
    expect(judgeBounds(2, { between: [4, 10] })).toEqual({ margin: -2, marginShare: -0.5, passes: false });
  });

  it('counts a share of the size of a limit below nil, and none of a limit that is nil', () => {
    expect(judgeBounds(-2, { atLeast: -4 })).toEqual({ margin: 2, marginShare: 0.5, passes: true });
    expect(judgeBounds(-2, { atMost: 0 })).toEqual({ margin: 2, passes: true });
  });

  it('passes a value at its limit, also where rounding has moved it, and no farther', () => {
    expect(judgeBounds(0.1 + 0.2, { atMost: 0.3 })).toMatchObject({ passes: true });
    expect(judgeBounds(0.3 * (1 + 1e-11), { atMost: 0.3 })).toMatchObject({ passes: false });
  });

  it('says nothing where there is no limit', () => {
    expect(judgeBounds(1, {})).toBeNull();
  });
});
