import type { CamLaw } from '../mechanism/kinds/body.js';

/** A law of motion at one point: displacement and its derivatives to the third, of unit rise over unit angle. */
export interface Motion {
  displacement: number;
  velocity: number;
  acceleration: number;
  jerk: number;
}

type ClosedLaw = Exclude<CamLaw, 'table'>;

/**
 * The dwell–rise–dwell laws in closed form, y(0) = 0, y(1) = 1. All are point-symmetric about (½, ½).
 * Source: VDI 2143-1 (1980); Norton, Cam Design and Manufacturing Handbook, ch. 2–3. The two modified laws are of the
 * SCCA family (sine, constant, cosine acceleration) with ramps b and d.
 *
 * @param x fraction of the segment's angle, 0 to 1
 */
export function motionLaw(law: ClosedLaw, x: number): Motion {
  if (x > 0.5) return mirrored(LAWS[law](1 - x));
  return LAWS[law](x);
}

const mirrored = (m: Motion): Motion => ({
  displacement: 1 - m.displacement,
  velocity: m.velocity,
  acceleration: -m.acceleration,
  jerk: m.jerk,
});

/** First halves, 0 ≤ x ≤ ½. */
const LAWS: Record<ClosedLaw, (x: number) => Motion> = {
  parabolic: (x) => ({ displacement: 2 * x * x, velocity: 4 * x, acceleration: 4, jerk: 0 }),
  harmonic: (x) => wave(Math.PI, x),
  cycloidal: (x) => {
    const turn = 2 * Math.PI;
    const sine = Math.sin(turn * x);
    const cosine = Math.cos(turn * x);
    return { displacement: x - sine / turn, velocity: 1 - cosine, acceleration: turn * sine, jerk: turn ** 2 * cosine };
  },
  '3-4-5': (x) => power([0, 0, 0, 10, -15, 6], x),
  '4-5-6-7': (x) => power([0, 0, 0, 0, 35, -84, 70, -20], x),
  'modified-trapezoid': (x) => scca(1 / 4, 1 / 4, x),
  'modified-sine': (x) => scca(1 / 4, 3 / 4, x),
};

/** y = ½ (1 − cos ωx) */
function wave(omega: number, x: number): Motion {
  const sine = Math.sin(omega * x) / 2;
  const cosine = Math.cos(omega * x) / 2;
  return {
    displacement: 0.5 - cosine,
    velocity: omega * sine,
    acceleration: omega ** 2 * cosine,
    jerk: -(omega ** 3) * sine,
  };
}

function power(coefficients: readonly number[], x: number): Motion {
  const value = [0, 0, 0, 0];
  coefficients.forEach((c, k) => {
    let factor = c;
    for (let order = 0; order < 4 && order <= k; order += 1) {
      value[order] += factor * x ** (k - order);
      factor *= k - order;
    }
  });
  return { displacement: value[0], velocity: value[1], acceleration: value[2], jerk: value[3] };
}

/**
 * Sine ramp over b/2, constant acceleration, cosine ramp over d/2; peak acceleration
 * C = 4π² / ((π² − 8)(b² − d²) − 2π(π − 2) b + π²).
 */
function scca(b: number, d: number, x: number): Motion {
  const pi = Math.PI;
  const peak = (4 * pi ** 2) / ((pi ** 2 - 8) * (b ** 2 - d ** 2) - 2 * pi * (pi - 2) * b + pi ** 2);
  const first = b / 2;
  if (x <= first) {
    const turn = pi / b;
    const sine = Math.sin(turn * x);
    const cosine = Math.cos(turn * x);
    return times(peak, {
      displacement: x / turn - sine / turn ** 2,
      velocity: (1 - cosine) / turn,
      acceleration: sine,
      jerk: turn * cosine,
    });
  }
  const speed = b / pi;
  const rise = b ** 2 / (2 * pi) - b ** 2 / pi ** 2;
  const level = Math.min(x, (1 - d) / 2) - first;
  const held = { displacement: rise + level * (speed + level / 2), velocity: speed + level, acceleration: 1, jerk: 0 };
  if (x <= (1 - d) / 2) return times(peak, held);
  const beyond = x - (1 - d) / 2;
  const turn = pi / d;
  const sine = Math.sin(turn * beyond);
  const cosine = Math.cos(turn * beyond);
  return times(peak, {
    displacement: held.displacement + held.velocity * beyond + (1 - cosine) / turn ** 2,
    velocity: held.velocity + sine / turn,
    acceleration: cosine,
    jerk: -turn * sine,
  });
}

const times = (k: number, m: Motion): Motion => ({
  displacement: k * m.displacement,
  velocity: k * m.velocity,
  acceleration: k * m.acceleration,
  jerk: k * m.jerk,
});
