/** One end of a connection. What is posted at one end is received at the other, in order. */
export interface Port {
  post(message: unknown, transfer?: ArrayBuffer[]): void;
  /** Sets the only receiver; `crashed` is called when the other side is gone. */
  listen(receive: (message: unknown) => void, crashed: (reason: string) => void): void;
}

interface WebEvent {
  data?: unknown;
  message?: string;
}
/** A web worker seen from the window, or the worker's own global scope. */
export interface WebTarget {
  postMessage(message: unknown, transfer: ArrayBuffer[]): void;
  addEventListener(type: string, listener: (event: WebEvent) => void): void;
}

export function webPort(target: WebTarget): Port {
  return {
    post: (message, transfer = []) => target.postMessage(message, transfer),
    listen: (receive, crashed) => {
      target.addEventListener('message', ({ data }) => receive(data));
      target.addEventListener('error', ({ message }) => crashed(message ?? 'the worker could not be loaded'));
      target.addEventListener('messageerror', () => crashed('a message could not be read'));
    },
  };
}

/** A Node thread seen from outside, its parent port, or one end of a message channel. */
export interface NodeTarget {
  postMessage(message: unknown, transfer: ArrayBuffer[]): void;
  on(event: string, listener: (value: unknown) => void): void;
}

export function nodePort(target: NodeTarget): Port {
  return {
    post: (message, transfer = []) => target.postMessage(message, transfer),
    listen: (receive, crashed) => {
      target.on('message', receive);
      target.on('error', (error) => crashed(error instanceof Error ? error.message : String(error)));
      target.on('exit', (code) => crashed(`the thread ended with status ${String(code)}`));
      target.on('messageerror', () => crashed('a message could not be read'));
    },
  };
}

/** Two ends in one process. Messages arrive after the poster's turn is over, as between threads. */
export function portPair(): [Port, Port] {
  const receivers: ((message: unknown) => void)[] = [];
  const waiting: unknown[][] = [[], []];
  const end = (own: 0 | 1): Port => ({
    post: (message) => {
      const other = 1 - own;
      if (receivers[other] === undefined) waiting[other].push(message);
      else void Promise.resolve().then(() => receivers[other](message));
    },
    listen: (receive) => {
      receivers[own] = receive;
      for (const message of waiting[own].splice(0)) void Promise.resolve().then(() => receive(message));
    },
  });
  return [end(0), end(1)];
}
