import { blend } from '../../sim/drawing/palette.js';
import type { Fill } from '../../sim/drawing/operations.js';
import type { Colours } from '../theme/apply.js';

/** A fill's colour on paper: tints are mixed, not see-through, so that nothing shines through a body. */
export function fillColour({ tone, tint = 1 }: Fill, colours: Colours): string {
  if (tone === 'marker') return colours.marked;
  return tint >= 1 ? colours[tone] : blend(colours[tone], colours.paper, tint);
}
