import type { Parts } from './run.js';

/** Elements of documents, SI, to be overridden as a test needs. */
export const disc = (id: string, at: [number, number], radius: number, mass: number, more: Parts = {}): Parts => ({
  id,
  shape: { kind: 'disc', radius },
  mass,
  at,
  ...more,
});
export const box = (
  id: string,
  at: [number, number],
  size: [number, number],
  mass: number,
  more: Parts = {},
): Parts => ({
  id,
  shape: { kind: 'box', width: size[0], height: size[1] },
  mass,
  at,
  ...more,
});
export const particle = (id: string, at: [number, number], mass: number, more: Parts = {}): Parts => ({
  id,
  shape: { kind: 'particle' },
  mass,
  at,
  ...more,
});

/** A straight track from one point to the next ones. */
export const track = (id: string, ...points: [number, number][]): Parts => ({
  id,
  from: points[0],
  to: points.slice(1).map((to) => ({ to })),
});
export const floor = track('floor', [-50, 0], [50, 0]);

export const degrees = (angle: number): number => (angle * Math.PI) / 180;

/** A straight track falling to the right at an angle [°], from the origin. */
export const ramp = (angle: number, length: number): Parts =>
  track('ramp', [0, 0], [length * Math.cos(degrees(angle)), -length * Math.sin(degrees(angle))]);

/** Sheet point at a distance along and above the ramp of an angle [°]. */
export const onRamp = (angle: number, along: number, above: number): [number, number] => {
  const [c, s] = [Math.cos(degrees(angle)), Math.sin(degrees(angle))];
  return [along * c + above * s, -along * s + above * c];
};

/** A free slider-crank, in top dead centre on its line: crank on a shaft at the origin, rod, slider on the x axis. */
export function sliderCrank({
  crank = 0.1,
  rod = 0.3,
  spin = 10,
  angle = Math.PI / 2,
  scale = 1,
}: Partial<Record<'crank' | 'rod' | 'spin' | 'angle' | 'scale', number>> = {}): Parts {
  const [a, l] = [crank * scale, rod * scale];
  const { slider, rodAngle, rodSpin, sliderSpeed } = sliderCrankMotion(a, l, angle, spin);
  const pinAt: [number, number] = [a * Math.cos(angle), a * Math.sin(angle)];
  const pinSpeed = [-spin * pinAt[1], spin * pinAt[0]];
  const bar = (id: string, length: number, mass: number, more: Parts): Parts => ({
    id,
    shape: { kind: 'bar', length, width: 0.02 * scale },
    mass,
    ...more,
  });
  return {
    gravity: [0, 0],
    bodies: [
      bar('crank', a, 1, {
        at: [pinAt[0] / 2, pinAt[1] / 2],
        angle,
        spin,
        velocity: [pinSpeed[0] / 2, pinSpeed[1] / 2],
      }),
      bar('rod', l, 2, {
        at: [(pinAt[0] + slider) / 2, pinAt[1] / 2],
        angle: rodAngle,
        spin: rodSpin,
        velocity: [(pinSpeed[0] + sliderSpeed) / 2, pinSpeed[1] / 2],
      }),
      {
        id: 'slider',
        shape: { kind: 'none' },
        mass: 1.5,
        inertia: 0.01 * scale * scale,
        at: [slider, 0],
        velocity: [sliderSpeed, 0],
      },
    ],
    joints: [
      { id: 'shaft', kind: 'pin', between: ['crank', 'ground'], at: [0, 0] },
      { id: 'crank-pin', kind: 'pin', between: ['rod', 'crank'], at: pinAt },
      { id: 'wrist', kind: 'pin', between: ['slider', 'rod'], at: [slider, 0] },
      { id: 'guide', kind: 'slide', between: ['slider', 'ground'], at: [slider, 0], axis: [1, 0] },
    ],
  };
}

/** Kinematics of the in-line slider-crank: x = a cos φ + √(l² − a² sin² φ) and its rates (any text on machines). */
export function sliderCrankMotion(
  a: number,
  l: number,
  angle: number,
  spin: number,
): { slider: number; rodAngle: number; rodSpin: number; sliderSpeed: number } {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const reach = Math.sqrt(l * l - a * a * s * s);
  return {
    slider: a * c + reach,
    rodAngle: Math.atan2(-a * s, reach),
    rodSpin: (-a * c * spin) / reach,
    sliderSpeed: -a * s * spin - (a * a * s * c * spin) / reach,
  };
}
