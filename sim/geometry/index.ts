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
export { massProperties, sectionOf, type MassProperties, type Section } from './mass-properties.js';
export { counterClockwise, isConvex, isInside, selfCrossings, signedArea, type Crossing } from './polygon.js';
export { camMotion, type CamMotion } from './cam-motion.js';
export { camOutline, camPoint, type CamPoint } from './cam-profile.js';
export { motionLaw, type Motion } from './cam-laws.js';
