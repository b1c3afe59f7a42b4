import { describe, expect, it } from 'vitest';
import { gaussLegendre } from '../../../../sim/core/quadrature.js';
import { box, degrees, disc, floor, onRamp, particle, ramp, track } from '../../../support/parts.js';
import { G, type Parts } from '../../../support/run.js';
import { byHand, checkOf, speedOf } from './by-hand.js';

const relative = (value: number, exact: number): number => Math.abs(value / exact - 1);

/** Start, and a second station. */
const stations = (when: Parts): Parts[] => [
  { id: '1', when: { start: true } },
  { id: '2', when },
];
const atTime = (time: number): Parts => ({
  stations: stations({ time }),
  run: { until: { station: '2' }, atMost: 10 },
});

/** The hand's speed of a body at station 2, and where it got to. */
function second(parts: Parts, of: string) {
  const checked = byHand(parts);
  const check = checkOf(checked, of, '1', '2');
  const row = checked.ran.station('2').row;
  return { check, speed: speedOf(check), motion: checked.ran.motion(of, row), checked };
}

describe('a straight path', () => {
  it('of a block on a ramp with friction: v² = 2 g L (sin α − μ cos α)', () => {
    const [angle, mu] = [30, 0.2];
    const { speed, motion, check } = second(
      {
        bodies: [box('block', onRamp(angle, 0.5, 0.1), [0.3, 0.2], 5, { angle: -degrees(angle) })],
        tracks: [ramp(angle, 10)],
        contacts: [{ between: ['block', 'ramp'], friction: mu }],
        ...atTime(0.8),
      },
      'block',
    );
    const [x, y] = onRamp(angle, 0.5, 0.1);
    const length = Math.hypot(motion.x - x, motion.y - y);
    const exact = Math.sqrt(2 * G * length * (Math.sin(degrees(angle)) - mu * Math.cos(degrees(angle))));
    expect(relative(speed, exact)).toBeLessThan(1e-9);
    expect(check.equation).toBe('½ m v₂² = m g h − μ m g cos α L');
    expect(Math.abs(check.difference ?? 1)).toBeLessThan(1e-3 * speed);
  });

  it('of a fall, which is the same from its height alone', () => {
    const { speed, motion, check } = second({ bodies: [disc('ball', [0, 0], 0.1, 2)], ...atTime(0.4) }, 'ball');
    expect(relative(speed, Math.sqrt(-2 * G * motion.y))).toBeLessThan(1e-12);
    expect(check.equation).toBe('½ m v₂² = m g h');
  });

  it('of a throw: the speed from the height, whatever the way', () => {
    const { speed, motion } = second(
      { bodies: [disc('ball', [0, 0], 0.1, 2, { velocity: [3, 2] })], ...atTime(0.7) },
      'ball',
    );
    expect(relative(speed, Math.sqrt(13 - 2 * G * motion.y))).toBeLessThan(1e-12);
  });

  it('of a constant push: F s less friction', () => {
    const { speed, motion, check } = second(
      {
        bodies: [box('crate', [0, 0.1], [0.4, 0.2], 20)],
        tracks: [floor],
        contacts: [{ between: ['crate', 'floor'], friction: 0.3 }],
        loads: [{ id: 'push', on: { of: 'crate', at: [0, 0.1] }, force: [100, 0] }],
        ...atTime(1),
      },
      'crate',
    );
    expect(relative(speed, Math.sqrt((2 * motion.x * (100 - 0.3 * 20 * G)) / 20))).toBeLessThan(1e-9);
    expect(check.lines[1]).toContain('F = 100 N (push)');
  });

  it('with a push from above, whose friction goes with the load: μ N L', () => {
    const { speed, motion, check } = second(
      {
        bodies: [box('crate', [0, 0.1], [0.4, 0.2], 20)],
        tracks: [floor],
        contacts: [{ between: ['crate', 'floor'], friction: 0.3 }],
        loads: [{ id: 'push', on: { of: 'crate', at: [0, 0.1] }, force: [150, -40] }],
        ...atTime(1),
      },
      'crate',
    );
    expect(relative(speed, Math.sqrt((2 * motion.x * (150 - 0.3 * (20 * G + 40))) / 20))).toBeLessThan(1e-9);
    expect(check.equation).toContain('μ N L');
  });
});

describe('springs and dampers', () => {
  it('gives the speed of a block let go by a spring against friction on a guide', () => {
    const { speed, motion, check } = second(
      {
        gravity: [0, -G],
        bodies: [box('slide-block', [0, 0], [0.1, 0.1], 2)],
        joints: [
          {
            id: 'guide',
            kind: 'slide',
            between: ['slide-block', 'ground'],
            at: [0, 0],
            axis: [1, 0],
            friction: { coefficient: 0.1 },
          },
        ],
        springs: [
          {
            id: 'spring',
            kind: 'linear',
            between: [
              { of: 'slide-block', at: [0, 0] },
              { of: 'ground', at: [1, 0] },
            ],
            rate: 200,
            freeLength: 0.5,
          },
        ],
        ...atTime(0.1),
      },
      'slide-block',
    );
    const end = 1 - motion.x - 0.5;
    const exact = Math.sqrt((2 * (0.5 * 200 * (0.25 - end ** 2) - 0.1 * 2 * G * motion.x)) / 2);
    expect(relative(speed, exact)).toBeLessThan(1e-9);
    expect(check.equation).toBe('½ m v₂² = ½ k (δ₁² − δ₂²) − μ m g L');
  });

  it('follows a spring that pulls aside, whose force changes the friction, like a fine quadrature', () => {
    const [rate, free, height, mass, mu] = [20, 0.3, 0.8, 4, 0.15];
    const { speed, motion, check } = second(
      {
        bodies: [box('block', [-1, 0.1], [0.2, 0.2], mass)],
        tracks: [floor],
        contacts: [{ between: ['block', 'floor'], friction: mu }],
        springs: [
          {
            id: 's',
            kind: 'linear',
            between: [
              { of: 'block', at: [-1, 0.1] },
              { of: 'ground', at: [0, 0.1 + height] },
            ],
            rate,
            freeLength: free,
          },
        ],
        ...atTime(0.4),
      },
      'block',
    );
    const net = (x: number): number => {
      const length = Math.hypot(x, height);
      const pull = rate * (length - free);
      return (-x / length) * pull - mu * (mass * G - (height / length) * pull);
    };
    expect(motion.x).toBeGreaterThan(-0.95);
    expect(relative(speed, Math.sqrt((2 * gaussLegendre(net, -1, motion.x)) / mass))).toBeLessThan(1e-7);
    expect(check.equation).toBe('½ m v₂² = ½ k (δ₁² − δ₂²) − W_floor');
  });

  it('takes what a damper takes at constant resistance: v₂ = v₁ − c s / m where nothing else acts', () => {
    const { speed, motion } = second(
      {
        gravity: [0, 0],
        bodies: [box('block', [0, 0], [0.1, 0.1], 3, { velocity: [2, 0] })],
        joints: [{ id: 'guide', kind: 'slide', between: ['block', 'ground'], at: [0, 0], axis: [1, 0] }],
        dampers: [
          {
            id: 'pot',
            between: [
              { of: 'block', at: [0, 0] },
              { of: 'ground', at: [-1, 0] },
            ],
            coefficient: 5,
          },
        ],
        ...atTime(0.5),
      },
      'block',
    );
    expect(relative(speed, 2 - (5 * motion.x) / 3)).toBeLessThan(1e-7);
  });
});

describe('curved paths', () => {
  /** A particle on a quarter of radius R, from level, with friction: d(v²)/dφ = 2 g R (cos φ − μ sin φ) − 2 μ v². */
  it('of an arc with friction agrees with the closed form of its equation', () => {
    const [radius, mu] = [2, 0.15];
    const { speed, motion, check } = second(
      {
        bodies: [particle('bead', [-radius, 0], 1.5, { velocity: [0, -1] })],
        tracks: [
          { id: 'bowl', from: [-radius, 0], to: [{ to: [0, -radius], bulge: Math.tan(Math.PI / 8), name: 'R' }] },
        ],
        contacts: [{ between: ['bead', 'bowl'], friction: mu }],
        ...atTime(0.55),
      },
      'bead',
    );
    const angle = Math.atan2(-motion.y, -motion.x);
    // v² e^{2μφ} = v₀² + ∫ 2 g R (cos φ − μ sin φ) e^{2μφ} dφ; N = m (v²/R + g sin φ).
    const gained = gaussLegendre(
      (phi) => 2 * G * radius * (Math.cos(phi) - mu * Math.sin(phi)) * Math.exp(2 * mu * phi),
      0,
      angle,
    );
    const exact = Math.sqrt((1 + gained) * Math.exp(-2 * mu * angle));
    expect(angle).toBeGreaterThan(0.8);
    expect(relative(speed, exact)).toBeLessThan(1e-7);
    expect(check.equation).toBe('½ m v₂² = ½ m v₁² + m g h − W_R');
  });

  it('of a spline without friction leaves the height alone', () => {
    const { speed, motion } = second(
      {
        bodies: [particle('bead', [0, 0], 1.5, { velocity: [1, -0.2] })],
        tracks: [
          {
            id: 'wave',
            from: [0, 0],
            to: [
              {
                through: [
                  [1, -0.3],
                  [2, -1],
                  [4, -1.2],
                  [6, -0.4],
                ],
              },
            ],
          },
        ],
        contacts: [{ between: ['bead', 'wave'] }],
        ...atTime(0.9),
      },
      'bead',
    );
    // It starts along the path, or the touch at the start takes what goes into it.
    expect(Math.abs(speed ** 2 - motion.speed ** 2)).toBeLessThan(2e-3 * motion.speed ** 2);
    expect(motion.x).toBeGreaterThan(1);
  });
});

describe('discs', () => {
  it('that roll without slip down a ramp: v² = 2 g h / (1 + ½)', () => {
    const { speed, motion, check } = second(
      {
        bodies: [disc('roller', onRamp(20, 0.5, 0.1), 0.1, 3, {})],
        tracks: [ramp(20, 20)],
        contacts: [{ between: ['roller', 'ramp'], friction: 0.5 }],
        ...atTime(1),
      },
      'roller',
    );
    const drop = onRamp(20, 0.5, 0.1)[1] - motion.y;
    expect(relative(speed, Math.sqrt((4 / 3) * G * drop))).toBeLessThan(1e-9);
    expect(check.equation).toBe('½ (m + I / r²) v₂² = m g h');
  });

  it('that slip first and then roll: v = ⅔ v₀', () => {
    const { speed, check } = second(
      {
        bodies: [disc('puck', [0, 0.1], 0.1, 2, { velocity: [3, 0] })],
        tracks: [floor],
        contacts: [{ between: ['puck', 'floor'], friction: 0.2 }],
        ...atTime(1),
      },
      'puck',
    );
    expect(relative(speed, 2)).toBeLessThan(1e-3);
    expect(check.equation.split('; ')).toHaveLength(2);
  });

  it('that roll against rolling resistance: b / r of the weight', () => {
    const { speed, motion } = second(
      {
        bodies: [disc('wheel', [0, 0.2], 0.2, 8, { velocity: [2, 0], spin: -10 })],
        tracks: [floor],
        contacts: [{ between: ['wheel', 'floor'], friction: 0.6, rollingResistance: 0.004 }],
        ...atTime(2),
      },
      'wheel',
    );
    expect(relative(speed, Math.sqrt(4 - (4 / 3) * (0.004 / 0.2) * G * motion.x))).toBeLessThan(1e-9);
  });
});

describe('bodies on a pin', () => {
  it('swing as OpenStax 8.3 has it: 1 m from 30°, 1.62 m/s at the bottom with g 9.8', () => {
    const start: [number, number] = [Math.sin(degrees(30)), -Math.cos(degrees(30))];
    const { speed, check } = second(
      {
        gravity: [0, -9.8],
        bodies: [particle('bob', start, 2)],
        joints: [{ id: 'pivot', kind: 'pin', between: ['bob', 'ground'], at: [0, 0] }],
        stations: stations({
          crosses: {
            point: { of: 'bob', at: start },
            line: [
              [0, -2],
              [0, 0],
            ],
          },
        }),
        run: { until: { station: '2' }, atMost: 3 },
      },
      'bob',
    );
    expect(relative(speed, 1.6204635404183)).toBeLessThan(1e-6);
    expect(check.equation).toBe('½ I_O ω₂² = m g h');
  });

  it('are driven by a torsion spring against a friction torque', () => {
    const { check, checked } = second(
      {
        gravity: [0, 0],
        bodies: [box('arm', [0.2, 0], [0.4, 0.05], 1)],
        joints: [{ id: 'pivot', kind: 'pin', between: ['arm', 'ground'], at: [0, 0], friction: { torque: 0.3 } }],
        springs: [{ id: 'wound', kind: 'torsion', between: ['arm', 'ground'], rate: 2, freeAngle: 1.5 }],
        ...atTime(0.15),
      },
      'arm',
    );
    const turned = checked.ran.motion('arm', checked.ran.station('2').row).angle;
    const inertia = (1 * (0.16 + 0.0025)) / 12 + 0.04;
    const exact = Math.sqrt((2 * (0.5 * 2 * (1.5 ** 2 - (1.5 - turned) ** 2) - 0.3 * turned)) / inertia);
    expect(relative(check.spin ?? 0, exact)).toBeLessThan(1e-9);
  });

  it('lose to a journal what μ r |R| takes, as a fine integration in time has it', () => {
    const { check } = second(
      {
        bodies: [box('arm', [0.3, 0], [0.6, 0.05], 4)],
        joints: [
          {
            id: 'pivot',
            kind: 'pin',
            between: ['arm', 'ground'],
            at: [0, 0],
            friction: { coefficient: 0.2, radius: 0.02 },
          },
        ],
        ...atTime(0.3),
      },
      'arm',
    );
    expect(relative(check.spin ?? 0, journalSwing(0.3))).toBeLessThan(1e-4);
  });
});

/** ω of that arm after a time, by small steps of the midpoint rule on I_O ω̇ = m g l cos θ − μ r |R|. */
function journalSwing(until: number): number {
  const [m, l, lever] = [4, 0.3, 0.2 * 0.02];
  const inertia = (m * (0.36 + 0.0025)) / 12 + m * l * l;
  const acceleration = (theta: number, omega: number): number => {
    let alpha = 0;
    for (let k = 0; k < 20; k += 1) {
      // Falling clockwise by θ below the level: tangential and radial parts of R.
      const along = m * (-omega * omega * l - G * Math.sin(theta));
      const across = m * (alpha * l - G * Math.cos(theta));
      alpha = (m * G * l * Math.cos(theta) - lever * Math.hypot(along, across)) / inertia;
    }
    return alpha;
  };
  const steps = 20000;
  const h = until / steps;
  let [theta, omega] = [0, 0];
  for (let k = 0; k < steps; k += 1) {
    const middle = omega + (h / 2) * acceleration(theta, omega);
    const half = theta + (h / 2) * omega;
    omega += h * acceleration(half, middle);
    theta += h * middle;
  }
  return omega;
}

describe('blows', () => {
  it('on the floor take ½ m u² (1 − e²)', () => {
    const { speed, motion, check } = second(
      {
        bodies: [disc('ball', [0, 1.1], 0.1, 2)],
        tracks: [floor],
        contacts: [{ between: ['ball', 'floor'], restitution: 0.7 }],
        ...atTime(0.6),
      },
      'ball',
    );
    const u = Math.sqrt(2 * G * 1);
    expect(relative(speed, Math.sqrt(0.49 * u * u - 2 * G * (motion.y - 0.1)))).toBeLessThan(1e-4);
    expect(check.equation).toContain('½ m u² (1 − e²)');
  });

  it('of two pucks leave each its own speed: OpenStax 9.4, 12 g at 2.5 m/s on 15 g, elastic', () => {
    const checked = byHand({
      gravity: [0, 0],
      bodies: [disc('blue', [0, 0], 0.03, 0.015), disc('red', [-0.5, 0], 0.03, 0.012, { velocity: [2.5, 0] })],
      contacts: [{ between: ['red', 'blue'], restitution: 1 }],
      stations: [
        { id: '1', when: { start: true } },
        { id: '2', when: { touch: ['red', 'blue'] } },
        { id: '3', when: { time: 0.4 } },
      ],
      run: { until: { station: '3' }, atMost: 1 },
    });
    const speed = (of: string): number => speedOf(checkOf(checked, of, '2', '3'));
    expect(relative(speed('blue'), (2 * 0.012 * 2.5) / 0.027)).toBeLessThan(1e-9);
    expect(relative(speed('red'), (0.003 * 2.5) / 0.027)).toBeLessThan(1e-9);
  });

  it('without rebound take half the relative motion, and both go on as one', () => {
    const checked = byHand({
      bodies: [
        box('car', [-1, 0.1], [0.4, 0.2], 1200, { velocity: [11, 0] }),
        box('truck', [0, 0.1], [0.4, 0.2], 3000),
      ],
      tracks: [floor],
      contacts: [
        { between: ['car', 'floor'], friction: 0.1 },
        { between: ['truck', 'floor'], friction: 0.1 },
        { between: ['car', 'truck'], restitution: 0 },
      ],
      stations: [
        { id: '1', when: { start: true } },
        { id: '2', when: { touch: ['car', 'truck'] } },
        { id: '3', when: { time: 1 } },
      ],
      run: { until: { station: '3' }, atMost: 2 },
    });
    const check = checkOf(checked, 'car', '2', '3');
    const at = (id: string): number => checked.ran.motion('car', checked.ran.station(id).row).x;
    const before = Math.sqrt(121 - 2 * 0.1 * G * (at('2') + 1));
    const after = (1200 / 4200) * before;
    expect(relative(speedOf(check), Math.sqrt(after ** 2 - 2 * 0.1 * G * (at('3') - at('2'))))).toBeLessThan(1e-9);
    expect(check.with).toEqual(['truck']);
  });

  it('of a hinged bar on a stop turn it back with e ω', () => {
    const { check } = second(
      {
        gravity: [0, 0],
        bodies: [box('bar', [0.5, 0], [1, 0.02], 2, { velocity: [0, -1], spin: -2 })],
        tracks: [track('stop', [0.6, -0.4], [1.2, -0.4])],
        joints: [{ id: 'hinge', kind: 'pin', between: ['bar', 'ground'], at: [0, 0] }],
        contacts: [{ between: ['bar', 'stop'], restitution: 0.5 }],
        ...atTime(0.5),
      },
      'bar',
    );
    expect(relative(check.spin ?? 0, 1)).toBeLessThan(1e-9);
  });
});

describe('printed examples', () => {
  it('Tayal 16.6: 5 kg falls 0.1 m on a spring of 500 N/m and presses it 26.91 cm', () => {
    const checked = byHand({
      gravity: [0, -9.81],
      bodies: [particle('mass', [0, 1.1], 5)],
      joints: [{ id: 'guide', kind: 'slide', between: ['mass', 'ground'], at: [0, 1.1], axis: [0, 1] }],
      springs: [
        {
          id: 'spring',
          kind: 'linear',
          between: [
            { of: 'ground', at: [0, 0] },
            { of: 'mass', at: [0, 1.1] },
          ],
          rate: 500,
          freeLength: 1,
          acts: 'compression',
        },
      ],
      ...{ stations: stations({ turns: { of: 'mass', along: [0, 1] } }), run: { until: { station: '2' }, atMost: 2 } },
    });
    const check = checkOf(checked, 'mass', '1', '2');
    expect(speedOf(check)).toBe(0);
    expect(check.equation).toBe('0 = m g h − ½ k (δ₁² − δ₂²)');
    // The height from the printed stroke, m g h = ½ k δ².
    expect(check.lines[1]).toMatch(/h = 369\.\d mm.*δ₁ = 0 m, δ₂ = 269\.\d mm/);
    expect(Math.abs(check.left ?? 1)).toBeLessThan(1e-3 * 18.1);
  });

  it('Tayal 16.10: 5 kg, 0.5 m down 30° to a spring of 1500 N/m, μ 0.2: 1.790 m/s at the spring', () => {
    const away: [number, number] = onRamp(30, 1.7, 0.1);
    const parts: Parts = {
      gravity: [0, -9.81],
      bodies: [box('block', onRamp(30, 0.5, 0.1), [0.2, 0.2], 5, { angle: -degrees(30) })],
      tracks: [ramp(30, 5)],
      contacts: [{ between: ['block', 'ramp'], friction: 0.2 }],
      springs: [
        {
          id: 'spring',
          kind: 'linear',
          between: [
            { of: 'block', at: onRamp(30, 0.5, 0.1) },
            { of: 'ground', at: away },
          ],
          rate: 1500,
          freeLength: 0.7,
          acts: 'compression',
        },
      ],
      stations: [
        { id: '1', when: { start: true } },
        {
          id: '2',
          when: {
            crosses: { point: { of: 'block', at: onRamp(30, 0.5, 0.1) }, line: [onRamp(30, 1, -1), onRamp(30, 1, 1)] },
          },
        },
        { id: '3', when: { turns: { of: 'block', along: [1, 0] } } },
      ],
      run: { until: { station: '3' }, atMost: 3 },
    };
    const checked = byHand(parts);
    expect(relative(speedOf(checkOf(checked, 'block', '1', '2')), 1.79049103817)).toBeLessThan(1e-5);
    const back = checkOf(checked, 'block', '2', '3');
    expect(speedOf(back)).toBe(0);
    expect(Math.abs(back.left ?? 1)).toBeLessThan(0.01);
  });

  it('OpenStax 7.3: a spring of 4500 N/m pressed 8 cm, and 3 kg that stop after 2 m at μ 0.245', () => {
    const checked = byHand({
      gravity: [0, -9.8],
      bodies: [box('block', [0, 0.05], [0.1, 0.1], 3)],
      tracks: [floor],
      contacts: [{ between: ['block', 'floor'], friction: 0.244897959 }],
      springs: [
        {
          id: 'spring',
          kind: 'linear',
          between: [
            { of: 'block', at: [0, 0.05] },
            { of: 'ground', at: [-0.5, 0.05] },
          ],
          rate: 4500,
          freeLength: 0.58,
          acts: 'compression',
        },
      ],
      stations: [
        { id: '1', when: { start: true } },
        { id: '2', when: { rests: 'block' } },
      ],
      run: { until: { station: '2' }, atMost: 5 },
    });
    const check = checkOf(checked, 'block', '1', '2');
    expect(speedOf(check)).toBe(0);
    expect(Math.abs(check.left ?? 1)).toBeLessThan(1e-3 * 14.4);
    expect(check.lines.at(-2)).toMatch(/^-?[−0.]+\d* J = 14\.40 − 14\.\d\d$/);
  });

  it('OpenStax 10.8: 12 N m on 30 kg m² over 8 turns: 6.34 rad/s', () => {
    const { check } = second(
      {
        gravity: [0, 0],
        bodies: [{ id: 'wheel', shape: { kind: 'none' }, mass: 20, inertia: 30, at: [0, 0] }],
        joints: [{ id: 'shaft', kind: 'pin', between: ['wheel', 'ground'], at: [0, 0] }],
        drives: [{ id: 'motor', on: 'shaft', torque: 12 }],
        stations: stations({ angle: { of: 'wheel', passes: 16 * Math.PI } }),
        run: { until: { station: '2' }, atMost: 30 },
      },
      'wheel',
    );
    expect(relative(check.spin ?? 0, 6.34132367616962)).toBeLessThan(1e-6);
    expect(check.equation).toBe('½ I_O ω₂² = M φ');
  });
});
