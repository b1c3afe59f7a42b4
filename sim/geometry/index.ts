export {
  buildTrack,
  joinTracks,
  pieceAt,
  TOUCHING,
  type Corner,
  type RunLink,
  type SmoothRun,
  type TrackPath,
} from './track-path.js';
export { nearestOnRun, pointAt } from './nearest.js';
export { newFoot, type ArcPiece, type Box, type CubicPiece, type Foot, type Piece } from './piece.js';
