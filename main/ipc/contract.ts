/** What the window may ask of the program: the whole of it. Each channel is one call without arguments, and one answer. */
export const channels = {
  openFile: 'joulewright:open-file',
  givenFile: 'joulewright:given-file',
} as const;
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
  /** The file that the program was started with; null when there was none. */
  givenFile(): Promise<FileContent | null>;
}

/** Where the window comes from in the program: a scheme of its own, never the network or the file system. */
export const windowScheme = 'joulewright';
export const windowAddress = `${windowScheme}://window/`;
