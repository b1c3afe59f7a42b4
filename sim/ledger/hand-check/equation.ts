import { joinTerms, type Factor, type Term } from './cause.js';
import { printed, printedSum, quantity, sumScale } from './figures.js';
import { endRate, kinetic, leftOf, type Mover, type Stage } from './stage.js';
import { fraction, number, operator, root, sum, symbol, words, type Expression, type Token } from './tokens.js';

/** Amounts below this share of the greatest are not written down. */
const NIL = 1e-5;

/** How the letters of a stage are numbered. */
interface Letters {
  stage: Stage;
  /** Bodies in the order of their numbers; one alone has none. */
  bodies: string[];
}

/** A stage as it is written down: symbols, what they stand for, numbers, answer. */
export function writeStage(stage: Stage): { equation: Expression; lines: Expression[] } {
  const terms = writtenTerms(stage);
  const letters: Letters = { stage, bodies: bodiesOf(stage, terms) };
  const numbered = terms.map((term) => ({ term, mark: familyMark(terms, term) }));
  const starts = kinetic(stage.start, stage.rate) > 0;
  const amounts: { sign: number; tokens: Token[] }[] = [
    ...(starts ? [{ sign: 1, tokens: kineticTokens(stage.start, stage.from, letters) }] : []),
    ...numbered.map(({ term, mark }) => ({
      sign: Math.sign(term.value),
      tokens: term.shape((name) => letter(name, term, mark, letters)),
    })),
  ];
  const equation: Expression = [
    ...(stage.rests === undefined ? kineticTokens(stage.end, stage.to, letters) : [number('0')]),
    operator('='),
    ...signed(amounts),
  ];
  const values = [...(starts ? [kinetic(stage.start, stage.rate)] : []), ...terms.map(({ value }) => value)];
  return {
    equation,
    lines: [
      ...stage.before,
      equation,
      ...factorLine(stage, numbered, letters, starts),
      numbersLine(stage, values),
      ...answer(stage, values, letters),
    ],
  };
}

function writtenTerms({ terms, start, rate }: Stage): Term[] {
  const joined = joinTerms(terms);
  const greatest = Math.max(kinetic(start, rate), ...joined.map(({ value }) => Math.abs(value)));
  const written = joined.filter(({ value }) => Math.abs(value) > NIL * greatest);
  // What came before what went.
  return [...written.filter(({ value }) => value > 0), ...written.filter(({ value }) => value < 0)];
}

function bodiesOf({ start, end }: Stage, terms: readonly Term[]): string[] {
  const named = terms.flatMap(({ factors }) =>
    factors.flatMap(({ name }) => (name.startsWith('m:') ? [name.slice(2)] : [])),
  );
  return [...new Set([...start.members, ...end.members, ...named])];
}

/** Number of a term among those of its family; nothing where it is the only one. */
function familyMark(terms: readonly Term[], term: Term): string {
  const family = terms.filter((each) => each.family === term.family);
  return family.length > 1 ? String(family.indexOf(term) + 1) : '';
}

function letter(name: string, term: Term, mark: string, { stage, bodies }: Letters): Token {
  if (name.startsWith('m:')) return massLetter(name.slice(2), bodies);
  if (name === 'g') return symbol('g');
  if (name === 'I_O') return symbol('I', { sub: 'O' });
  const [base, end] = name.split('.');
  const of = term.factors.find((factor) => factor.name === name)?.of;
  const at = end === 'from' ? stage.from : end === 'to' ? stage.to : '';
  const sub = end === 'u' ? 'u' : [at, mark].filter(Boolean).join(',');
  return symbol(base, { sub, ...(of ? { of } : {}) });
}

function massLetter(body: string, bodies: readonly string[]): Token {
  return symbol('m', { sub: bodies.length > 1 ? String(bodies.indexOf(body) + 1) : '', of: [body] });
}

/** ½ m v₂², ½ (m₁ + m₂) v₂², ½ (m + I / r²) v₂², ½ I_O ω₂². */
function kineticTokens(mover: Mover, at: string, { bodies }: Letters): Token[] {
  const masses = mover.members.map((id) => [massLetter(id, bodies)]);
  const half = fraction([number('1')], [number('2')]);
  const rate = symbol(mover.kind === 'pin' ? 'ω' : 'v', { sub: at, power: 2, of: mover.members });
  if (mover.kind === 'pin') return [half, symbol('I', { sub: 'O', of: mover.members }), rate];
  if (mover.kind === 'mass') return [half, ...sum(masses), rate];
  return [half, ...sum([...masses, [fraction([symbol('I')], [symbol('r', { power: 2 })])]]), rate];
}

function signed(amounts: readonly { sign: number; tokens: Token[] }[]): Token[] {
  if (amounts.length === 0) return [number('0')];
  return amounts.flatMap(({ sign, tokens }, i) => {
    if (i === 0) return sign < 0 ? [operator('−'), ...tokens] : tokens;
    return [operator(sign < 0 ? '−' : '+'), ...tokens];
  });
}

/** m = 4.2 kg, g = 9.807 m/s², μ₁ = 0.11 (crate/chute), … */
function factorLine(
  stage: Stage,
  numbered: { term: Term; mark: string }[],
  letters: Letters,
  starts: boolean,
): Expression[] {
  const seen = new Set<string>();
  const line: Token[] = [];
  const put = (name: Token, value: Token, of?: string[]): void => {
    const key = JSON.stringify(name);
    if (seen.has(key)) return;
    seen.add(key);
    line.push(
      ...(line.length > 0 ? [operator(',')] : []),
      name,
      operator('='),
      value,
      ...(of ? [words(`(${of.join('/')})`)] : []),
    );
  };
  for (const mover of [stage.start, stage.end]) putMover(mover, letters, put);
  if (starts) {
    const { kind } = stage.start;
    put(
      symbol(kind === 'pin' ? 'ω' : 'v', { sub: stage.from }),
      quantity(stage.rate, kind === 'pin' ? 'spin' : 'speed'),
    );
  }
  for (const { term, mark } of numbered) {
    for (const factor of term.factors) {
      put(
        letter(factor.name, term, mark, letters),
        quantity(shown(factor), factor.kind),
        factor.name === 'I_O' ? undefined : noted(factor, letters),
      );
    }
  }
  return line.length > 0 ? [[words('where'), ...line]] : [];
}

/** Amounts are printed by size; their signs are in the equation. */
const shown = ({ value }: Factor): number => Math.abs(value);

function noted({ name, of }: Factor, { bodies }: Letters): string[] | undefined {
  return name.startsWith('m:') && bodies.length < 2 ? undefined : of;
}

function putMover(mover: Mover, letters: Letters, put: (name: Token, value: Token, of?: string[]) => void): void {
  if (mover.kind === 'pin') {
    put(symbol('I', { sub: 'O' }), quantity(mover.measure, 'inertia'));
    return;
  }
  mover.members.forEach((id, i) => {
    put(
      massLetter(id, letters.bodies),
      quantity(mover.masses[i], 'mass'),
      letters.bodies.length > 1 ? [id] : undefined,
    );
  });
  if (mover.rolling) {
    put(symbol('I'), quantity(mover.rolling.inertia, 'inertia'));
    put(symbol('r'), quantity(mover.rolling.radius, 'length'));
  }
}

/** 8.238 J = 17.299 − 4.853 − 2.614 − 1.594, adding up as printed. */
function numbersLine(stage: Stage, values: readonly number[]): Expression {
  const left = leftOf(stage);
  const scale = sumScale(values, stage.rests === undefined ? left : 0);
  const rounded = printedSum(values, scale);
  const parts = [...rounded.amounts, ...(rounded.left === 0 ? [] : [rounded.left])];
  const amounts = parts.map((count) => ({
    sign: count < 0 ? -1 : 1,
    tokens: [number(printed(Math.abs(count), scale))],
  }));
  return [number(printed(rounded.total, scale), scale.unit), operator('='), ...signed(amounts)];
}

function answer(stage: Stage, values: readonly number[], { bodies }: Letters): Expression[] {
  const { end, to } = stage;
  const isPin = end.kind === 'pin';
  const name = symbol(isPin ? 'ω' : 'v', { sub: to, of: end.members });
  const rate = endRate(stage);
  if (stage.rests !== undefined) return [[name, operator('='), number('0'), operator(','), words(stage.rests)]];
  if (values.length === 0) return [[name, operator('='), number('0')]];
  const scale = sumScale(values, leftOf(stage));
  const measure = quantity(end.measure, isPin ? 'inertia' : 'mass');
  const under = [
    number('2'),
    operator('×'),
    number(printed(printedSum(values, scale).total, scale), scale.unit),
    operator('/'),
    measure,
  ];
  const line = [name, operator('='), root(under), operator('='), quantity(rate, isPin ? 'spin' : 'speed')];
  if (!isPin || !end.pin || end.pin.arm === 0) return [line];
  const [v, r] = [symbol('v', { sub: to, of: bodies }), symbol('r', { sub: 'G' })];
  const omega = symbol('ω', { sub: to });
  return [
    line,
    [
      v,
      operator('='),
      omega,
      r,
      operator('='),
      quantity(rate * end.pin.arm, 'speed'),
      words('of the centre of mass,'),
      r,
      operator('='),
      quantity(end.pin.arm, 'length'),
    ],
  ];
}
