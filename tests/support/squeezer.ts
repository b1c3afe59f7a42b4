import type { Parts } from './run.js';

/**
 * Andrews' squeezing mechanism: seven bodies, three loops, one spring, a constant torque (Test Set for IVP Solvers, problem
 * andrews.f, rev. 2006-10-02; Hairer & Wanner, *Solving ODEs II*, 2nd ed. 1996, VII.7). Bodies K1 to K7 stand at the angles
 * β, β + Θ, γ, Φ + δ, δ, Ω + ε, ε.
 */
const [d, da, e, ea, rr, ra] = [0.028, 0.0115, 0.02, 0.01421, 0.007, 0.00092];
const [sa, sb, sc, sd] = [0.01874, 0.01043, 0.018, 0.02];
const [ta, tb, u, ua, ub, zf, zt, fa] = [0.02308, 0.00916, 0.04, 0.01228, 0.00449, 0.02, 0.04, 0.01421];
const A: Point = [-0.06934, -0.00227];
const B: Point = [-0.03635, 0.03273];
const C: Point = [0.014, 0.072];

type Point = [number, number];

/** The seven coordinates (β, Θ, γ, Φ, δ, Ω, ε) of the consistent start. */
export const START = [
  -0.0617138900142764496358948458001, 0, 0.455279819163070380255912382449, 0.222668390165885884674473185609,
  0.48736497954384255022559895353, -0.222668390165885884674473185609, 1.23054744454982119249735015568,
] as const;

export function squeezer(until: number): Parts {
  const [beta, theta, gamma, phi, delta, omega, epsilon] = START;
  const [cos, sin] = [Math.cos, Math.sin];
  const at = ([x, y]: Point, along: number, across: number, angle: number): Point => [
    x + along * cos(angle) - across * sin(angle),
    y + along * sin(angle) + across * cos(angle),
  ];
  const O: Point = [0, 0];
  const F = at(O, rr, 0, beta);
  const E = at(F, -d, 0, beta + theta);
  const D = at(B, sd, -sc, gamma);
  const H = at(A, zt, 0, delta);
  const G = at(A, 0, -u, epsilon);
  const body = (id: string, place: Point, angle: number, mass: number, inertia: number): Parts => ({
    id,
    shape: { kind: 'none' },
    mass,
    inertia,
    at: place,
    angle,
  });
  const pin = (id: string, first: string, second: string, place: Point): Parts => ({
    id,
    kind: 'pin',
    between: [first, second],
    at: place,
  });
  return {
    gravity: [0, 0],
    bodies: [
      body('K1', at(O, ra, 0, beta), beta, 0.04325, 2.194e-6),
      body('K2', at(F, -da, 0, beta + theta), beta + theta, 0.00365, 4.41e-7),
      body('K3', at(B, sb, -sa, gamma), gamma, 0.02373, 5.255e-6),
      body('K4', at(H, 0, -(e - ea), phi + delta), phi + delta, 0.00706, 5.667e-7),
      body('K5', at(A, ta, tb, delta), delta, 0.0705, 1.169e-5),
      body('K6', at(G, zf - fa, 0, omega + epsilon), omega + epsilon, 0.00706, 5.667e-7),
      body('K7', at(A, -ub, -ua, epsilon), epsilon, 0.05498, 1.912e-5),
    ],
    joints: [
      pin('O', 'K1', 'ground', O),
      pin('F', 'K2', 'K1', F),
      pin('B', 'K3', 'ground', B),
      pin('E3', 'K3', 'K2', E),
      pin('E4', 'K4', 'K2', E),
      pin('E6', 'K6', 'K2', E),
      pin('H', 'K5', 'K4', H),
      pin('A5', 'K5', 'ground', A),
      pin('G', 'K7', 'K6', G),
      pin('A7', 'K7', 'ground', A),
    ],
    springs: [
      {
        id: 'spring',
        kind: 'linear',
        between: [
          { of: 'ground', at: C },
          { of: 'K3', at: D },
        ],
        rate: 4530,
        freeLength: 0.07785,
      },
    ],
    drives: [{ id: 'motor', on: 'O', torque: 0.033 }],
    run: { until },
  };
}
