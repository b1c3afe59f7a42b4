import type { Token } from '../../sim/ledger/index.js';

/** A gap that no line is broken at, and one that it may be. */
const [tied, free] = ['\u00a0', ' '];

/** The gaps before and after a token of a line: factors stand close, a line breaks before an operator or after a comma. */
export function spacing(tokens: readonly Token[], index: number): [before: string, after: string] {
  const token = tokens[index];
  const isFirst = index === 0;
  if (token.kind === 'words')
    return [isFirst || isOpening(tokens[index - 1]) ? '' : free, isClosing(tokens[index + 1]) ? '' : free];
  if (token.kind !== 'operator') return ['', ''];
  switch (token.text) {
    case '=':
      // A list of values is broken between them.
      return [tokens[0].kind === 'words' ? tied : free, tied];
    case '+':
    case '−':
      return [isFirst || isOpening(tokens[index - 1]) ? '' : free, tied];
    case '×':
    case '/':
      return [tied, tied];
    case 'cos':
      return [tied, tied];
    case ',':
      return ['', free];
    default:
      return ['', ''];
  }
}

const isClosing = (token: Token | undefined) =>
  token?.kind === 'operator' && (token.text === ')' || token.text === ',');
const isOpening = (token: Token) => token.kind === 'operator' && token.text === '(';

/** One half, which has a letter of its own. */
export function isHalf({ over, under }: Extract<Token, { kind: 'fraction' }>): boolean {
  const isNumber = (part: readonly Token[], text: string) =>
    part.length === 1 && part[0].kind === 'number' && part[0].text === text;
  return isNumber(over, '1') && isNumber(under, '2');
}
