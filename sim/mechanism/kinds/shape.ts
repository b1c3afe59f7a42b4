import type { Place } from '../../core/problem.js';
import type { Vec } from '../../core/vec.js';
import { distance } from '../../core/vec.js';
import { selfCrossings } from '../../geometry/index.js';
import { inside, type Reading } from '../fields/reading.js';
import { list, position, quantity, record, required, tagged } from '../fields/spec.js';
import { camFields } from './cam.js';

/** Checks and solvers take time that grows with the square of the corners. */
const MOST_CORNERS = 1000;

const size = quantity('length', 'mm', { above: 0 });

/** Field table of every shape; what goes wrong in a cam's turn is checked where the cam is resolved. */
export const shapeFields = tagged('a shape', 'kind', {
  particle: record('a particle', {}),
  disc: record('a disc', { radius: required(size, 'Radius.') }),
  box: record('a box', { width: required(size, 'Along its x axis.'), height: required(size, 'Along its y axis.') }),
  bar: record('a bar', {
    length: required(size, 'Between the centres of its round ends.'),
    width: required(size, 'Across, and diameter of its round ends.'),
  }),
  polygon: record(
    'a polygon',
    { points: required(list(position, 3), 'Corners in body coordinates, either way round; convex or not.') },
    { check: ({ points }, place, reading) => checkPolygon(points, inside(place, 'points'), reading) },
  ),
  cam: camFields,
  none: record('no shape', {}),
});

function checkPolygon(points: Vec[], place: Place, reading: Reading): void {
  if (points.length > MOST_CORNERS) {
    reading.report('too-many', place, { found: `${points.length} points`, accepted: `at most ${MOST_CORNERS}` });
    return;
  }
  const repeated = points.findIndex((point, i) => distance(point, points[(i + 1) % points.length]) === 0);
  if (repeated >= 0) {
    const next = (repeated + 1) % points.length;
    const found = `points ${repeated} and ${next} in one place`;
    reading.report('repeated-point', inside(place, next), { found, accepted: 'corners apart from each other' });
    return;
  }
  const [crossing] = selfCrossings(points);
  if (!crossing) return;
  const found = `edges ${crossing.edges[0]} and ${crossing.edges[1]} meeting`;
  reading.report('self-crossing', place, { found, accepted: 'an outline that nowhere meets itself' });
}
