/** A piece of a typeset line. `of` names the element a symbol stands for, so that a window may print its item number. */
export type Token =
  | { kind: 'symbol'; name: string; sub?: string; power?: number; of?: string[] }
  | { kind: 'number'; text: string; unit?: string }
  | { kind: 'operator'; text: Operator }
  | { kind: 'words'; text: string }
  | { kind: 'fraction'; over: Token[]; under: Token[] }
  | { kind: 'root'; of: Token[] };

export type Operator = '=' | '+' | '−' | '×' | '/' | '(' | ')' | ',' | 'cos';

/** One line of a hand check, from left to right. */
export type Expression = Token[];

/** What a symbol carries beside its name. */
type SymbolParts = Omit<Extract<Token, { kind: 'symbol' }>, 'kind' | 'name'>;

export const symbol = (name: string, parts: SymbolParts = {}): Token => ({
  kind: 'symbol',
  name,
  ...(parts.sub ? { sub: parts.sub } : {}),
  ...(parts.power === undefined ? {} : { power: parts.power }),
  ...(parts.of ? { of: parts.of } : {}),
});
export const number = (text: string, unit?: string): Token => ({
  kind: 'number',
  text,
  ...(unit === undefined ? {} : { unit }),
});
export const operator = (text: Operator): Token => ({ kind: 'operator', text });
export const words = (text: string): Token => ({ kind: 'words', text });
export const fraction = (over: Token[], under: Token[]): Token => ({ kind: 'fraction', over, under });
export const root = (of: Token[]): Token => ({ kind: 'root', of });

/** (a + b + …), or a alone. */
export function sum(parts: Token[][]): Token[] {
  if (parts.length === 1) return parts[0];
  return [operator('('), ...joined(parts, operator('+')), operator(')')];
}

/** Lists with a token between them. */
export function joined(parts: Token[][], between: Token): Token[] {
  return parts.flatMap((part, i) => (i === 0 ? part : [between, ...part]));
}

/** A line in plain characters: `½ m v₂² = m g h − μ m g cos 20° L`. */
export function plainText(line: readonly Token[]): string {
  let text = '';
  line.forEach((token, i) => {
    const isTight = i === 0 || isOpening(line[i - 1]) || isClosing(token);
    text += (isTight ? '' : ' ') + tokenText(token);
  });
  return text;
}

const isOpening = (token: Token): boolean => token.kind === 'operator' && token.text === '(';
const isClosing = (token: Token): boolean => token.kind === 'operator' && (token.text === ')' || token.text === ',');

function tokenText(token: Token): string {
  switch (token.kind) {
    case 'symbol':
      return `${token.name}${subscript(token.sub)}${token.power === undefined ? '' : superscript(token.power)}`;
    case 'number':
      return token.unit === undefined ? token.text : `${token.text}${token.unit === '°' ? '' : ' '}${token.unit}`;
    case 'operator':
    case 'words':
      return token.text;
    case 'fraction':
      return fractionText(token.over, token.under);
    case 'root':
      return `√(${plainText(token.of)})`;
  }
}

function fractionText(over: Token[], under: Token[]): string {
  const [above, below] = [plainText(over), plainText(under)];
  if (above === '1' && below === '2') return '½';
  const bracketed = (text: string, parts: Token[]): string => (parts.length > 1 ? `(${text})` : text);
  return `${bracketed(above, over)} / ${bracketed(below, under)}`;
}

const SUBSCRIPTS: Readonly<Record<string, string>> = {
  ...Object.fromEntries(Array.from('0123456789', (digit, i) => [digit, '₀₁₂₃₄₅₆₇₈₉'[i]])),
  '′': '′',
  '″': '″',
  '‴': '‴',
  '⁗': '⁗',
};

function subscript(sub: string | undefined): string {
  if (sub === undefined) return '';
  const characters = Array.from(sub);
  if (characters.every((character) => character in SUBSCRIPTS)) {
    return characters.map((character) => SUBSCRIPTS[character]).join('');
  }
  return `_${sub.replace(/\s+/g, '')}`;
}

function superscript(power: number): string {
  return Array.from(String(power), (digit) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(digit)]).join('');
}
