import { expect, it } from 'vitest';
import { Progress } from '../../../main/cli/progress.js';
import { recordedTerminal } from './recorded-terminal.js';

it('writes progress over one line and wipes it where somebody watches', () => {
  const terminal = recordedTerminal('', true);
  const progress = new Progress(terminal);
  progress.show(0.5, 2);
  progress.show(2.0001, 2);
  progress.clear();
  expect(terminal.written).toEqual({
    out: '',
    err: '\r 25 %  0.500 s of 2.000 s\r100 %  2.000 s of 2.000 s\r\u001b[K',
  });
});

it('writes nothing where nobody watches', () => {
  const terminal = recordedTerminal();
  const progress = new Progress(terminal);
  progress.show(1, 2);
  progress.clear();
  expect(terminal.written).toEqual({ out: '', err: '' });
});
