/** Holds a joint until it lets go; the joint is removed then. */
export interface Latch {
  id: string;
  joint: string;
  releasesAt: { time: number } | { station: string } | { force: number };
}
