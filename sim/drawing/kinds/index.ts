import type { Mechanism } from '../../mechanism/model.js';
import type { DrawingContext, Figure } from '../figure.js';
import { bodyFigures } from './body.js';
import { damperFigures } from './damper.js';
import { driveFigures } from './drive.js';
import { jointFigures } from './joint.js';
import { latchFigures } from './latch.js';
import { loadFigures } from './load.js';
import { springFigures } from './spring.js';
import { trackFigures } from './track.js';

/** The lists of a mechanism whose elements have a symbol of their own on the sheet. */
export type DrawnList = 'tracks' | 'springs' | 'dampers' | 'bodies' | 'joints' | 'loads' | 'drives' | 'latches';
type SymbolOf<K extends DrawnList> = (element: Mechanism[K][number], context: DrawingContext) => Figure[];

/** One symbol maker for each kind of element; a new kind without one does not compile. */
const symbols = {
  tracks: trackFigures,
  springs: springFigures,
  dampers: damperFigures,
  bodies: bodyFigures,
  joints: jointFigures,
  loads: loadFigures,
  drives: driveFigures,
  latches: latchFigures,
} satisfies { [K in DrawnList]: SymbolOf<K> };

/** The symbols of everything in a mechanism. */
export function elementFigures(context: DrawingContext): Figure[] {
  return (Object.keys(symbols) as DrawnList[]).flatMap((list) => {
    const symbol = symbols[list] as (element: unknown, context: DrawingContext) => Figure[];
    return context.mechanism[list].flatMap((element) => symbol(element, context));
  });
}
