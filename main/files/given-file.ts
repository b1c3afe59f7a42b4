/**
 * The file that a command line names: its last word that is no option, past the program and its own folder. Null where
 * it names none.
 *
 * @param words as in `process.argv`, without the words that start the program
 */
export function givenFile(words: readonly string[]): string | null {
  return words.filter((word) => !word.startsWith('-') && word !== '.').at(-1) ?? null;
}
