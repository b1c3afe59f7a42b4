import type { Pair } from '../contact/pair.js';
import type { Dynamics } from '../dynamics.js';
import type { DryFriction } from '../element.js';
import { Row } from '../row.js';

/** Rolling resistance of a pair: a torque against the relative turn, at most lever arm × normal force. */
export function buildRolling(pair: Pair, dynamics: () => Dynamics): DryFriction | null {
  if (!pair.rolling) return null;
  const row = new Row();
  row.addTurn(pair.first, 1);
  row.addTurn(pair.second, -1);
  const normalForce = (): number => {
    const { groups, parts } = dynamics();
    let sum = 0;
    for (const group of groups) if (group.pair === pair) for (const { lambda } of group.members) sum += lambda;
    for (const point of parts.soft) if (point.isPressed && point.point.pair === pair) sum += Math.max(0, point.normal);
    return sum;
  };
  return {
    row,
    sliding: 0,
    get isActive() {
      const { groups, parts } = dynamics();
      return (
        groups.some((group) => group.pair === pair) ||
        parts.soft.some(({ isPressed, point }) => isPressed && point.pair === pair)
      );
    },
    account: pair.rolling,
    lambda: 0,
    bound: () => pair.rollingResistance * normalForce(),
    update: () => undefined,
  };
}
