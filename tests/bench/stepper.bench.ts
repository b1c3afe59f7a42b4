import { Box, Circle, Edge, World } from 'planck';
import { Engine } from '../../sim/stepper/engine.js';
import { defaultStep } from '../../sim/stepper/index.js';
import { box, degrees, disc, floor, onRamp, particle, ramp, sliderCrank, track } from '../support/parts.js';
import { G, mechanismOf, run, type Parts } from '../support/run.js';

/**
 * What the stepper costs beside plain planck, and how right it is, in one run. 200 discs and boxes fall into a box and come
 * to rest: plain planck with shapes of its own, then the stepper in its default configuration, both with one step and as
 * many steps. The need is on what the two have in common: one solve, with all that is booked and recorded, at most 1.25
 * times plain planck. What the stepper solves more often than planck (trials up to an event, impacts, corrections) is told
 * beside it.
 */
const COUNT = 200;
const STEPS = 600;
const LIMIT = 1.25;
/** Runs of both; of every figure the median is told. */
const REPEATS = 3;
/** Velocity iterations of plain planck: as many sweeps as the stepper allows a solve in a pile of this size. */
const ITERATIONS = 12;
/** Steps that one takes before the other has its turn. */
const TURN = 20;
const SIDE = 0.05;

/** Even bodies are discs, odd ones boxes, in rows of 20 that start a little apart. */
const places = Array.from({ length: COUNT }, (_, i) => {
  const [column, row] = [i % 20, Math.floor(i / 20)];
  return { isDisc: i % 2 === row % 2, x: 0.07 * column + 0.005 * (row % 3) + 0.04, y: 0.07 * row + 0.04 };
});
const WALLS: [number, number][] = [
  [0, 2],
  [0, 0],
  [1.5, 0],
  [1.5, 2],
];

function pile(): Parts {
  return {
    bodies: places.map(({ isDisc, x, y }, i) =>
      isDisc ? disc(`d${i}`, [x, y], SIDE / 2, 1) : box(`b${i}`, [x, y], [SIDE, SIDE], 1),
    ),
    tracks: [track('bin', ...WALLS)],
    contacts: [{ between: ['*', '*'], friction: 0.3 }],
    run: { until: 10 },
  };
}

/** The same in planck alone, in the stepper's units (bodies about one unit across, gravity about one). */
function planckWorld(length: number): World {
  const world = new World({ gravity: { x: 0, y: -1 }, allowSleep: false });
  const ground = world.createBody();
  for (const [i, from] of WALLS.slice(0, -1).entries()) {
    const to = WALLS[i + 1];
    const at = ([x, y]: [number, number]): { x: number; y: number } => ({ x: x / length, y: y / length });
    ground.createFixture(new Edge(at(from), at(to)), { friction: 0.3 });
  }
  const half = SIDE / 2 / length;
  for (const { isDisc, x, y } of places) {
    const body = world.createBody({ type: 'dynamic', position: { x: x / length, y: y / length } });
    const area = isDisc ? Math.PI * half * half : 4 * half * half;
    body.createFixture(isDisc ? new Circle(half) : new Box(half, half), { density: 1 / area, friction: 0.3 });
  }
  return world;
}

/** Time spent in named methods [ms]; what a method calls of the others is taken off it. */
class Clocks {
  readonly spent = new Map<string, number>();
  private readonly inner: number[] = [];

  /** `name` is asked at each call where it depends on what went before. */
  wrap(name: string | (() => string), target: object, method: string): void {
    const methods = target as Record<string, (...args: unknown[]) => unknown>;
    const plain = methods[method].bind(target);
    methods[method] = (...args) => {
      const label = typeof name === 'string' ? name : name();
      const began = performance.now();
      this.inner.push(0);
      const result = plain(...args);
      const took = performance.now() - began;
      const within = this.inner.pop() ?? 0;
      if (this.inner.length > 0) this.inner[this.inner.length - 1] += took;
      this.spent.set(label, (this.spent.get(label) ?? 0) + took - within);
      return result;
    };
  }
}

/** What the bench reads of an engine's parts, which are no one else's business. */
interface EngineParts {
  trial: object & { count: number };
  solver: {
    sweeps: number;
    solves: number;
    unconverged: number;
    solveStep: (...args: unknown[]) => void;
    rigid: object;
  };
  projection: object;
  recorder: object;
  assembly: { scene: { scale: { length: number; time: number } }; manager: object };
}

/** Sweeps of the steps' own solves, apart from those of impacts and corrections. */
function countSweeps(solver: { sweeps: number; solveStep: (...args: unknown[]) => void }): () => number {
  let sum = 0;
  const solve = solver.solveStep.bind(solver);
  solver.solveStep = (...args) => {
    const before = solver.sweeps;
    solve(...args);
    sum += solver.sweeps - before;
  };
  return () => sum;
}

/** Takes both through all steps, by turns of a few, so that a busy machine slows both alike. @returns [ms] of each */
function race(one: () => void, other: () => void): [one: number, other: number] {
  const spent: [number, number] = [0, 0];
  for (let done = 0; done < STEPS; done += TURN) {
    for (const [i, step] of [one, other].entries()) {
      const began = performance.now();
      for (let k = 0; k < TURN; k += 1) step();
      spent[i] += performance.now() - began;
    }
  }
  return spent;
}

const mechanism = mechanismOf(pile());
const { step } = defaultStep(mechanism);
const options = { step, rowEvery: Math.max(1, Math.floor(mechanism.run.atMost / step / 2000)) };

/** One race of both [ms a step each], with what of the stepper's goes to solves that planck does not do. */
function measure(): { plain: number; whole: number; trials: number; impacts: number; told: string } {
  const engine = new Engine(mechanism, options);
  const { assembly, trial, solver, recorder } = engine as unknown as EngineParts;
  const { length, time } = assembly.scene.scale;
  const inSolves = countSweeps(solver);
  const world = planckWorld(length);
  const clocks = new Clocks();
  const runs = { run: 0, passed: 0, commit: 0 };
  for (const [target, method] of [
    [trial, 'run'],
    [trial, 'passed'],
    [engine, 'commit'],
  ] as const) {
    // The first of each in a step is what one solve takes; the others look for events, or go on from one.
    clocks.wrap(() => ((runs[method] += 1) === 1 ? 'one solve' : 'more trials'), target, method);
  }
  clocks.wrap('impacts', engine, 'strike');
  // Contacts are readied once, for impacts; what has just closed is looked at on the way.
  clocks.wrap('impacts', solver.rigid, 'prepareShock');
  // Every row counts as bookkeeping, also those of impacts.
  clocks.wrap('rows', recorder, 'row');
  const [stepper, plain] = race(
    () => {
      runs.run = runs.passed = runs.commit = 0;
      engine.step();
    },
    () => {
      world.step(step / time, ITERATIONS, 3);
    },
  );
  const told =
    `${(trial.count / STEPS).toFixed(2)} trials a step, ${(inSolves() / solver.solves).toFixed(1)} sweeps a solve; ` +
    `${((solver.sweeps - inSolves()) / STEPS).toFixed(1)} sweeps a step for impacts and corrections; ` +
    `${solver.unconverged} solves ran out of sweeps`;
  const perStep = (name: string): number => (clocks.spent.get(name) ?? 0) / STEPS;
  return {
    plain: plain / STEPS,
    whole: stepper / STEPS,
    trials: perStep('more trials'),
    impacts: perStep('impacts'),
    told,
  };
}

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];
}

function cost(): boolean {
  const races = Array.from({ length: REPEATS }, measure);
  const plain = median(races.map((race) => race.plain));
  const line = (what: string, of: (race: (typeof races)[0]) => number): number => {
    const ratio = median(races.map((race) => of(race) / race.plain));
    console.log(
      `  ${what.padEnd(48)} ${(1000 * ratio * plain).toFixed(0).padStart(6)} µs  ${ratio.toFixed(2).padStart(6)}`,
    );
    return ratio;
  };
  console.log(`${COUNT} bodies, ${STEPS} steps of ${step.toPrecision(3)} s, median of ${REPEATS} runs`);
  console.log(`  ${'a step'.padEnd(48)}            × plain`);
  line(`plain planck, ${ITERATIONS} velocity iterations`, (race) => race.plain);
  const whole = line('stepper, default configuration, in all', (race) => race.whole);
  const comparable = line(
    `  one solve, booked and recorded (need: ${LIMIT})`,
    (race) => race.whole - race.trials - race.impacts,
  );
  line('  beside it: further trials, up to events', (race) => race.trials);
  line('  beside it: impacts and corrections', (race) => race.impacts);
  console.log(`  ${races[0].told}`);
  phases(new Engine(mechanism, options), whole);
  return comparable <= LIMIT;
}

/** The same run once more with clocks in it: where the time goes. */
function phases(engine: Engine, ratio: number): void {
  const clocks = new Clocks();
  const { trial, solver, projection, recorder, assembly } = engine as unknown as EngineParts;
  clocks.wrap('solve', solver, 'solveStep');
  clocks.wrap('contact geometry', assembly.manager, 'refresh');
  clocks.wrap('trial, events', trial, 'run');
  clocks.wrap('trial, events', trial, 'passed');
  clocks.wrap('projection', projection, 'apply');
  clocks.wrap('impacts, corrections', engine, 'strike');
  clocks.wrap('bookkeeping', engine, 'book');
  clocks.wrap('recording rows', recorder, 'row');
  const began = performance.now();
  for (let i = 0; i < STEPS; i += 1) engine.step();
  const total = performance.now() - began;
  console.log('where the time goes (a second run, with clocks):');
  let rest = total;
  const line = (name: string, ms: number): void => {
    const share = ((100 * ms) / total).toFixed(1).padStart(5);
    console.log(`  ${name.padEnd(22)} ${share} %  ${((ms / total) * ratio).toFixed(2).padStart(6)} × plain planck`);
  };
  for (const [name, ms] of [...clocks.spent].sort(([, a], [, b]) => b - a)) {
    line(name, ms);
    rest -= ms;
  }
  line('all else', rest);
}

function accuracy(): boolean {
  const figures: [what: string, error: number, bound: number][] = [];
  const add = (what: string, error: number, bound: number): void => void figures.push([what, Math.abs(error), bound]);
  const c = Math.cos(degrees(30));

  const block = run({
    bodies: [box('block', onRamp(30, 1, 0.05), [0.2, 0.1], 3, { angle: -degrees(30) })],
    tracks: [ramp(30, 20)],
    contacts: [{ between: ['block', 'ramp'], friction: 0.2 }],
    run: { until: 1 },
  });
  add('block on a ramp: speed', block.motion('block').speed / (G * (0.5 - 0.2 * c)) - 1, 1e-4);

  const rolling = run({
    bodies: [disc('disc', onRamp(30, 1, 0.1), 0.1, 2)],
    tracks: [ramp(30, 20)],
    contacts: [{ between: ['disc', 'ramp'], friction: 0.3 }],
    run: { until: 1 },
  });
  add('rolling disc: speed', rolling.motion('disc').speed / ((G * 0.5 * 2) / 3) - 1, 1e-4);

  const bouncing = run({
    bodies: [disc('ball', [0, 1.05], 0.05, 1)],
    tracks: [floor],
    contacts: [{ between: ['ball', 'floor'], restitution: 0.8 }],
    run: { until: 3.3 },
  });
  const sixth = bouncing.events('touch')[5].approachSpeed;
  add('five bounces: height', sixth ** 2 / (2 * G * 0.8 ** 10) - 1, 1e-3);

  const arc = run({
    bodies: [particle('bead', [-1, 0], 1)],
    tracks: [{ id: 'bowl', from: [-1, 0], to: [{ to: [1, 0], bulge: 1 }] }],
    contacts: [{ between: ['bead', 'bowl'] }],
    stations: [
      {
        id: 'bottom',
        when: {
          crosses: {
            point: { of: 'bead', at: [-1, 0] },
            line: [
              [0, 0],
              [0, -2],
            ],
          },
        },
      },
    ],
    run: { until: 1 },
  });
  add('particle over an arc: speed', arc.motion('bead', arc.station('bottom').row).speed / Math.sqrt(2 * G) - 1, 1e-4);

  const crank = run({ ...sliderCrank(), run: { until: 0.7 } });
  const { kineticFrom, kineticTo } = crank.ledger();
  add('free slider-crank, a turn: energy', kineticTo / kineticFrom - 1, 2e-3);

  const creeping = run({
    bodies: [box('block', onRamp(15, 1, 0.05), [0.2, 0.1], 3, { angle: -degrees(15) })],
    tracks: [ramp(15, 20)],
    contacts: [{ between: ['block', 'ramp'], friction: 0.3 }],
    run: { until: 5 },
  });
  add('box on 15°, 5 s: creep [m]', creeping.motion('block').x - creeping.motion('block', 0).x, 1e-6);

  console.log('\naccuracy at the default step');
  for (const [what, error, bound] of figures) {
    console.log(`  ${what.padEnd(36)} ${error.toExponential(1).padStart(9)}  (need: ${bound.toExponential(0)})`);
  }
  return figures.every(([, error, bound]) => error <= bound);
}

const isCheap = cost();
const isRight = accuracy();
process.exitCode = isCheap && isRight ? 0 : 1;
