import { dimensionless, multiplyDimensions, type Dimension } from './dimension.js';
import { one, over, power, times, type Exact } from './exact.js';

/** A unit, or a product of units: its factor to SI and its dimension. */
export interface Unit {
  factor: Exact;
  dimension: Dimension;
}

/** Why a text is no unit. */
export interface UnitFault {
  code: 'unknown-unit' | 'ambiguous-unit' | 'quantity-syntax';
  found: string;
  accepted: string;
}

export type UnitResult = { ok: true; unit: Unit } | { ok: false; fault: UnitFault };

const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const token =
  /\s*(?:([A-Za-zµ]+|[°%'"](?![\d^⁻⁰¹²³⁴⁵⁶⁷⁸⁹]))(?:\^?([+-]?\d{1,2})|\^\(([+-]?\d{1,2})\)|([⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+))?|([*·⋅/()-]))/y;

/**
 * Reads a product of units: symbols with powers ("m^3", "m³", "s^-1"), joined by a space, `*`, `·` or `-`, divided by `/`.
 * What follows a `/` is one unit or a product in parentheses: "N/m s" could mean two things and is a fault.
 */
export function readProduct(text: string, lookup: (symbol: string) => Unit | undefined): UnitResult {
  const tokens = tokensOf(text);
  if (!tokens) return syntaxFault(text);
  const reader = new ProductReader(tokens, text, lookup);
  try {
    return { ok: true, unit: reader.product(0) };
  } catch (error) {
    if (error instanceof FaultyUnit) return { ok: false, fault: error.fault };
    throw error;
  }
}

type Token = { symbol: string; power: number } | { mark: string };

function tokensOf(text: string): Token[] | undefined {
  const tokens: Token[] = [];
  const end = text.trimEnd().length;
  token.lastIndex = 0;
  while (token.lastIndex < end) {
    const match = token.exec(text);
    if (!match) return undefined;
    const [, symbol, digits, bracketed, raised, mark] = match;
    tokens.push(symbol ? { symbol, power: powerOf(digits ?? bracketed, raised) } : { mark });
  }
  return tokens;
}

function powerOf(digits: string | undefined, raised: string | undefined): number {
  if (digits !== undefined) return Number(digits);
  if (raised === undefined) return 1;
  const plain = Array.from(raised, (c) => (c === '⁻' ? '-' : String(superscripts.indexOf(c)))).join('');
  return Number(plain);
}

const syntaxFault = (text: string): UnitResult => ({
  ok: false,
  fault: { code: 'quantity-syntax', found: `"${text.trim()}"`, accepted: 'a unit such as mm, N/mm, kg m^2 or N s/m' },
});

/** Carries a fault out of the recursion of one call of `readProduct`. */
class FaultyUnit extends Error {
  constructor(readonly fault: UnitFault) {
    super(fault.code);
  }
}

class ProductReader {
  private next = 0;

  constructor(
    private readonly tokens: Token[],
    private readonly text: string,
    private readonly lookup: (symbol: string) => Unit | undefined,
  ) {}

  product(depth: number): Unit {
    let unit: Unit = { factor: one, dimension: dimensionless };
    let isDivided = false;
    let joint = '';
    while (this.next < this.tokens.length && !this.peek(')')) {
      if (this.peek('/')) joint = this.take('/');
      else if (this.peek('*') || this.peek('·') || this.peek('⋅') || this.peek('-')) joint = this.take('*');
      if (joint !== '/' && isDivided) throw this.ambiguous();
      const factor = this.factor(depth);
      unit = joint === '/' ? divide(unit, factor) : multiply(unit, factor);
      isDivided ||= joint === '/';
      joint = '';
    }
    if (depth === 0 && this.next < this.tokens.length) throw this.syntax();
    return unit;
  }

  private factor(depth: number): Unit {
    if (this.peek('(') && depth < 4) {
      this.next += 1;
      const inner = this.product(depth + 1);
      if (!this.peek(')')) throw this.syntax();
      this.next += 1;
      return inner;
    }
    const now = this.tokens[this.next];
    if (!now || 'mark' in now) throw this.syntax();
    this.next += 1;
    const unit = this.lookup(now.symbol);
    if (!unit) throw this.unknown(now.symbol);
    return raise(unit, now.power);
  }

  private peek(mark: string): boolean {
    const now = this.tokens[this.next];
    return now !== undefined && 'mark' in now && now.mark === mark;
  }

  private take(mark: string): string {
    this.next += 1;
    return mark;
  }

  private syntax(): FaultyUnit {
    const accepted = 'a unit such as mm, N/mm, kg m^2 or N s/m';
    return new FaultyUnit({ code: 'quantity-syntax', found: `"${this.text.trim()}"`, accepted });
  }

  private unknown(symbol: string): FaultyUnit {
    const accepted = 'a known unit, such as mm, kg, N, s, deg, rpm, in or lbf';
    return new FaultyUnit({ code: 'unknown-unit', found: symbol, accepted });
  }

  private ambiguous(): FaultyUnit {
    const accepted = 'one unit after the /, or a product in parentheses, as in N/(m s)';
    return new FaultyUnit({ code: 'ambiguous-unit', found: `"${this.text.trim()}"`, accepted });
  }
}

const multiply = (a: Unit, b: Unit): Unit => ({
  factor: times(a.factor, b.factor),
  dimension: multiplyDimensions(a.dimension, b.dimension),
});

const divide = (a: Unit, b: Unit): Unit => ({
  factor: over(a.factor, b.factor),
  dimension: multiplyDimensions(a.dimension, b.dimension, -1),
});

const raise = (a: Unit, exponent: number): Unit => ({
  factor: power(a.factor, exponent),
  dimension: multiplyDimensions(dimensionless, a.dimension, exponent),
});
