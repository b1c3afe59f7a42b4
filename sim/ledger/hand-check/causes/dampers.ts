import { dot, norm, scale, subtract, type Vec } from '../../../core/vec.js';
import type { Damper } from '../../../mechanism/kinds/damper.js';
import { workTerm } from '../cause.js';
import { movingEnds, placeOn, placeRate, type PushingCause, type Stretch } from './force.js';

/** What dampers take, ∫ c |l̇|ⁿ dl along the way. */
export function damperCauses(stretch: Stretch): PushingCause[] {
  return stretch.scene.mechanism.dampers.flatMap((damper) => {
    const parts = damper.kind === 'rotary' ? damper.between : damper.between.map(({ of }) => of);
    const moving = movingEnds(stretch, damper.id, parts);
    if (!moving.includes(true) || moving.every(Boolean)) return [];
    return [damperCause(stretch, damper)];
  });
}

function damperCause(stretch: Stretch, damper: Damper): PushingCause {
  const term = (work: number) => workTerm(damper.id, damper.id, [damper.id], work);
  const tension = (speed: number): number => damper.coefficient * Math.abs(speed) ** damper.exponent * Math.sign(speed);
  if (damper.kind === 'rotary') {
    const { course } = stretch;
    const sign = course.members.includes(damper.between[0]) ? 1 : -1;
    const turn = (q: number): number => sign * course.rate(q).turn;
    return { rate: (q, square) => -tension(turn(q) * Math.sqrt(square)) * turn(q), term };
  }
  const [a, b] = damper.between;
  const line = (q: number): Vec => subtract(placeOn(stretch, b, q), placeOn(stretch, a, q));
  const along = (q: number): Vec => scale(line(q), 1 / (norm(line(q)) || 1));
  const lengthening = (q: number): number =>
    dot(along(q), subtract(placeRate(stretch, b, q), placeRate(stretch, a, q)));
  const pull = (q: number, square: number): number => {
    const rate = lengthening(q);
    const acts = damper.acts === 'both' || (damper.acts === 'compression' ? rate < 0 : rate > 0);
    return acts ? tension(rate * Math.sqrt(square)) : 0;
  };
  return {
    rate: (q, square) => -pull(q, square) * lengthening(q),
    pushes: [a, b]
      .map(({ of }, i) => ({
        on: of,
        force: (q: number, square: number) => scale(along(q), (i === 0 ? 1 : -1) * pull(q, square)),
      }))
      .filter(({ on }) => stretch.course.members.includes(on)),
    term,
  };
}
