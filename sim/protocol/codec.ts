import { ProtocolError } from './errors.js';
import type { ClientMessage, ServerMessage, WireError } from './messages.js';

type Fields = Record<string, unknown>;

const clientFields: Record<ClientMessage['type'], (fields: Fields) => boolean> = {
  request: ({ method }) => typeof method === 'string',
  cancel: () => true,
  credit: ({ count }) => isCount(count),
};

const serverFields: Record<ServerMessage['type'], (fields: Fields) => boolean> = {
  progress: (fields) => 'progress' in fields,
  done: (fields) => 'result' in fields,
  failed: ({ error }) => isWireError(error),
  cancelled: () => true,
};

/** @throws ProtocolError `bad-message` */
export function decodeClientMessage(message: unknown): ClientMessage {
  return decode(message, clientFields) as ClientMessage;
}

/** @throws ProtocolError `bad-message` */
export function decodeServerMessage(message: unknown): ServerMessage {
  return decode(message, serverFields) as ServerMessage;
}

function decode(message: unknown, known: Record<string, (fields: Fields) => boolean>): unknown {
  if (isFields(message) && isCount(message.id) && typeof message.type === 'string') {
    const fits = Object.hasOwn(known, message.type) ? known[message.type] : undefined;
    if (fits?.(message)) return message;
  }
  throw new ProtocolError('bad-message', `A message of this protocol has a type and an id; found ${sketch(message)}.`);
}

function isFields(value: unknown): value is Fields {
  return typeof value === 'object' && value !== null;
}

function isCount(value: unknown): value is number {
  return typeof value === 'number' && Number.isSafeInteger(value) && value >= 0;
}

function isWireError(value: unknown): value is WireError {
  return isFields(value) && typeof value.code === 'string' && typeof value.message === 'string';
}

function sketch(message: unknown): string {
  if (!isFields(message)) return typeof message;
  return `an object with the keys ${Object.keys(message).slice(0, 8).join(', ') || '(none)'}`;
}
