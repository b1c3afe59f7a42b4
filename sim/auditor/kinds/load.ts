import type { Load } from '../../mechanism/kinds/load.js';
import type { Force } from '../element.js';
import { Row } from '../row.js';
import { markOf, newPlaced, partOf, placeMark, turnOf, type System } from '../system.js';

/** A load; `isOn` tells whether its time has come, as of the last event. */
export function buildLoad(system: System, load: Load, isOn: () => boolean): Force {
  const body = partOf(system, load.kind === 'force' ? load.on.of : load.on);
  const account = system.ledgers.open('load', load.id, [body]);
  const row = new Row();
  const place = newPlaced();
  const force: Force = {
    row,
    size: 0,
    account,
    isLossy: false,
    inputRatio: 0,
    update(q) {
      force.size = 0;
      if (body < 0 || !isOn()) return;
      row.clear();
      if (load.kind === 'torque') {
        row.addTurn(body, 1);
        force.size = load.torque;
        return;
      }
      const [fx, fy] = load.force;
      const angle = load.follows === 'body' ? turnOf(system, body, q) : 0;
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      placeMark(mark, q, null, place);
      row.addPoint(body, c * fx - s * fy, s * fx + c * fy, place.rx, place.ry, 1);
      force.size = 1;
    },
  };
  const mark = load.kind === 'force' ? markOf(system, load.on) : { body, x: 0, y: 0 };
  return force;
}
