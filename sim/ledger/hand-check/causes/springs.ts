import { norm, scale, subtract, type Vec } from '../../../core/vec.js';
import type { LinearSpring, Spring, TorsionSpring } from '../../../mechanism/kinds/spring.js';
import { workTerm, type Factor, type Term } from '../cause.js';
import type { Quantity } from '../figures.js';
import { refuse } from '../refusal.js';
import { fraction, number, operator, type Token } from '../tokens.js';
import { movingEnds, placeOn, type PushingCause, type Stretch } from './force.js';

/** What springs that end on the bodies of a course give: ½ k (δ₁² − δ₂²). */
export function springCauses(stretch: Stretch): PushingCause[] {
  return stretch.scene.mechanism.springs.flatMap((spring) => springCause(stretch, spring));
}

function springCause(stretch: Stretch, spring: Spring): PushingCause[] {
  const parts = spring.kind === 'torsion' ? spring.between : spring.between.map(({ of }) => of);
  const moving = movingEnds(stretch, spring.id, parts);
  if (!moving.includes(true) || moving.every(Boolean)) return [];
  if (spring.kind === 'gas') return refuse(`The gas spring ${spring.id} has no closed form here.`);
  return [spring.kind === 'torsion' ? torsion(stretch, spring) : linear(stretch, spring)];
}

function torsion({ scene, course }: Stretch, spring: TorsionSpring): PushingCause {
  const turned = (part: string, q: number): number =>
    scene.isBody(part) ? course.pose(part, q).angle - scene.body(part).angle : 0;
  const [first, second] = spring.between;
  const deflection = (q: number): number => turned(first, q) - turned(second, q) - spring.freeAngle;
  const energy = (q: number): number => 0.5 * spring.rate * deflection(q) ** 2;
  const ends = (): [number, number] => [deflection(0), deflection(course.length)];
  return {
    given: (q) => energy(0) - energy(q),
    term: (work) => squares(spring.id, work, ['k', spring.rate, 'angular-rate'], ['φ', ends(), 'angle']),
  };
}

function linear(stretch: Stretch, spring: LinearSpring): PushingCause {
  const line = (q: number): Vec =>
    subtract(placeOn(stretch, spring.between[1], q), placeOn(stretch, spring.between[0], q));
  const deflection = (q: number): number => norm(line(q)) - spring.freeLength;
  const energy = (q: number): number => storedIn(spring, deflection(q));
  const pull = (q: number): Vec => scale(line(q), forceOf(spring, deflection(q)) / (norm(line(q)) || 1));
  const acting = (q: number): number => (isSlack(spring, deflection(q)) ? 0 : deflection(q));
  const ends = (): [number, number] => [acting(0), acting(stretch.course.length)];
  return {
    given: (q) => energy(0) - energy(q),
    pushes: spring.between
      .map(({ of }, i) => ({ on: of, force: (q: number) => scale(pull(q), i === 0 ? 1 : -1) }))
      .filter(({ on }) => stretch.course.members.includes(on)),
    term: (work) =>
      spring.curve
        ? workTerm(spring.id, spring.id, [spring.id], work)
        : squares(spring.id, work, ['k', spring.rate, 'rate'], ['δ', ends(), 'length']),
  };
}

function squares(
  id: string,
  value: number,
  [k, rate, rateKind]: [string, number, Quantity],
  [name, [from, to], kind]: [string, [number, number], Quantity],
): Term {
  const factors: Factor[] = [
    { name: k, value: rate, kind: rateKind, joins: 'last', of: [id] },
    { name: `${name}.from`, value: Math.abs(from), kind, joins: 'first' },
    { name: `${name}.to`, value: Math.abs(to), kind, joins: 'last' },
  ];
  const squared = (token: Token): Token => (token.kind === 'symbol' ? { ...token, power: 2 } : token);
  return {
    key: `spring ${id}`,
    family: `spring ${name}`,
    value,
    factors,
    shape: (factor) => [
      fraction([number('1')], [number('2')]),
      factor(k),
      operator('('),
      squared(factor(`${name}.from`)),
      operator('−'),
      squared(factor(`${name}.to`)),
      operator(')'),
    ],
  };
}

const isSlack = ({ acts }: LinearSpring, deflection: number): boolean =>
  (acts === 'compression' && deflection > 0) || (acts === 'extension' && deflection < 0);

/** Force of a spring, positive where it pulls its ends together [N]. */
export function forceOf(spring: LinearSpring, deflection: number): number {
  if (isSlack(spring, deflection)) return 0;
  return spring.curve ? heightOn(spring.curve, deflection) : spring.rate * deflection;
}

/** Energy stored [J]: ½ k δ², or the area under its curve from the relaxed length. */
function storedIn(spring: LinearSpring, deflection: number): number {
  if (isSlack(spring, deflection)) return 0;
  return spring.curve ? areaUnder(spring.curve, 0, deflection) : 0.5 * spring.rate * deflection ** 2;
}

/** A line through points, its end slopes going on. */
function heightOn(curve: readonly Vec[], x: number): number {
  if (curve.length === 1) return curve[0][1];
  const i = Math.min(Math.max(curve.findIndex(([at]) => at > x) - 1, x < curve[0][0] ? 0 : -1), curve.length - 2);
  const k = i < 0 ? (x < curve[0][0] ? 0 : curve.length - 2) : i;
  const [[x0, y0], [x1, y1]] = [curve[k], curve[k + 1]];
  return y0 + ((y1 - y0) * (x - x0)) / (x1 - x0);
}

/** ∫ of that line between two places: exact, by trapezia between its points. */
export function areaUnder(curve: readonly Vec[], from: number, to: number): number {
  if (to < from) return -areaUnder(curve, to, from);
  const marks = [from, ...curve.map(([x]) => x).filter((x) => x > from && x < to), to];
  return marks.slice(1).reduce((area, x, i) => {
    return area + ((heightOn(curve, marks[i]) + heightOn(curve, x)) / 2) * (x - marks[i]);
  }, 0);
}
