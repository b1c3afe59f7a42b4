/** Tells whether the system is set to dark, now and whenever it changes. Returns what stops it. */
export function followSystem(tell: (dark: boolean) => void): () => void {
  const query = window.matchMedia('(prefers-color-scheme: dark)');
  const listener = () => tell(query.matches);
  listener();
  query.addEventListener('change', listener);
  return () => query.removeEventListener('change', listener);
}
