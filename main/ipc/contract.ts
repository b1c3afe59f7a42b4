/** What the window may ask of the program: the whole of it. Each channel is one call with one answer. */
export const channels = { openFile: 'joulewright:open-file' } as const;
export type Channel = (typeof channels)[keyof typeof channels];

/** A file as the window gets it. */
export interface FileContent {
  name: string;
  text: string;
  /** [bytes] */
  size: number;
}

/** What the preload script puts on the window as `joulewright`. */
export interface WindowBridge {
  /** Shows the open dialog; null when nothing was chosen. */
  openFile(): Promise<FileContent | null>;
}
