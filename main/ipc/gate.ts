import { ipcMain, type IpcMainInvokeEvent } from 'electron';
import { windowAddress, type Channel } from './contract.js';

/** Answers a call of the window. */
export type Answer = (event: IpcMainInvokeEvent) => Promise<unknown>;

/**
 * The one gate between window and program. A call passes if it is one of the contract's, comes from the main frame of our
 * own page, and brings no arguments; anything else is refused before a handler sees it.
 */
export function openGate(answers: Readonly<Record<Channel, Answer>>): void {
  for (const channel of Object.keys(answers) as Channel[])
    ipcMain.handle(channel, (event, ...given: unknown[]) => {
      const refusal = refusalOf(event, given);
      if (refusal !== null) throw new Error(`${channel} is refused: ${refusal}.`);
      return answers[channel](event);
    });
}

function refusalOf({ senderFrame }: IpcMainInvokeEvent, given: readonly unknown[]): string | null {
  if (senderFrame?.parent !== null) return 'it comes from a frame inside the page';
  if (!senderFrame.url.startsWith(windowAddress)) return 'it comes from another page';
  if (given.length > 0) return 'it takes no arguments';
  return null;
}
