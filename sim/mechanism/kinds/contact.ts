/**
 * One contact pair after wildcards and materials are resolved: exactly two element ids (body–body or body–track).
 * Each pair is an account of its own.
 */
export interface ContactPair {
  /** In the order of the document's entry; where a wildcard expanded: body first, then the other. */
  between: [string, string];
  staticFriction: number;
  kineticFriction: number;
  restitution: number;
  /** Lever arm of rolling resistance [m]. */
  rollingResistance: number;
  /** Below this approach speed the pair does not rebound [m/s]. */
  restSpeed: number;
  /** Present for a compliant pair: [N/m], [N s/m], the pair's value shared among the points of a face. */
  compliant?: { stiffness: number; damping: number };
  /** JSON pointer of the entry that set it. */
  pointer: string;
}
