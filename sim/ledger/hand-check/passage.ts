import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Pin, Slide } from '../../mechanism/kinds/joint.js';
import type { Passage } from './course.js';
import { groupOf, isStill } from './group.js';
import type { Leg } from './happenings.js';
import { chord, goesStraight, lineCourse } from './line-course.js';
import { pinCourse } from './pin-course.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';
import { trackCourses } from './track-course.js';

/**
 * How a body goes through a leg: what of the hand's methods fits. Refuses, with the sentence that says which assumption
 * fails, where none does.
 *
 * @param speed its speed by hand as the leg begins [m/s]
 */
export function passageOf(scene: Scene, body: string, leg: Leg, speed: number): Passage & { members: string[] } {
  const time = leg.to - leg.from;
  if (isStill(scene, body, leg)) {
    const isShort = speed * time <= 2e-5 * scene.mechanism.extent;
    return { kind: isShort && speed > 0 ? 'none' : 'still', members: [body] };
  }
  const members = groupOf(scene, body, leg);
  const joints = groundJoints(scene, members, leg);
  const pin = joints.find((joint): joint is Pin => joint.kind === 'pin');
  if (pin) {
    if (members.length > 1) refuse(`${members[1]} rides on ${body}, which turns.`);
    refuseTouching(scene, body, leg);
    return { kind: 'courses', members, courses: [pinCourse(scene, body, leg, pin)] };
  }
  const belt = carryingBelt(scene, body, leg);
  if (belt) return { kind: 'carried', members, ...belt };
  const onTrack = members.length === 1 && joints.length === 0 && runsOnTrack(scene, body, leg);
  if (onTrack) return { kind: 'courses', members, courses: trackCourses(scene, body, leg) };
  if (goesStraight(scene, body, leg))
    return { kind: 'courses', members, courses: [lineCourse(scene, members, leg, joints)] };
  if (joints.length === 0 && !isTouching(scene, body, leg)) {
    return { kind: 'flight', members, from: scene.pose(body, leg.from), to: scene.pose(body, leg.to) };
  }
  return refuse(`${body} turns as it goes, so that one speed does not tell its energy.`);
}

/** Whether anything touches a body during a leg, or a joint holds it. */
export function isHeld(scene: Scene, body: string, leg: Leg): boolean {
  return isTouching(scene, body, leg) || scene.jointsOf(body, leg.rows[0]).length > 0;
}

function isTouching(scene: Scene, body: string, { rows }: Leg): boolean {
  return scene.pairsOf(body).some((pair) => isLasting(scene, pair, rows));
}

/** A pair that touches in more than the rows beside a blow. */
function isLasting(scene: Scene, pair: ContactPair, rows: readonly number[]): boolean {
  return rows.filter((row) => scene.touches(pair, row)).length > Math.min(2, rows.length / 2);
}

function refuseTouching(scene: Scene, body: string, { rows }: Leg): void {
  const touching = scene.pairsOf(body).find((pair) => rows.filter((row) => scene.touches(pair, row)).length > 1);
  if (touching) refuse(`${touching.between.join(' and ')} stay in touch while ${body} turns.`);
}

/** Joints of the bodies with the ground; any other makes a mechanism of several links. */
function groundJoints(scene: Scene, members: readonly string[], leg: Leg): (Pin | Slide)[] {
  return members.flatMap((member) => {
    const joints = scene.jointsOf(member, leg.rows[0]).map((joint) => {
      const isGround = joint.between.includes('ground') && (joint.kind === 'pin' || joint.kind === 'slide');
      if (!isGround || scene.tiesOf(joint.id).length > 0) {
        return refuse(`${member} is a link of a mechanism of several links (${joint.id}).`);
      }
      return joint;
    });
    if (joints.length > 1) refuse(`${joints.map(({ id }) => id).join(' and ')} share the load of ${member}.`);
    return joints;
  });
}

/** A particle or disc in touch with a still track. */
function runsOnTrack(scene: Scene, body: string, { rows }: Leg): boolean {
  const { kind } = scene.body(body).shape;
  if (kind !== 'particle' && kind !== 'disc') return false;
  return scene.pairsOf(body).some((pair) => {
    const track = scene.mechanism.tracks.find(({ id }) => pair.between.includes(id));
    return track?.surfaceSpeed === 0 && isLasting(scene, pair, rows);
  });
}

/** The belt that a body moves with, without slip. */
function carryingBelt(scene: Scene, body: string, leg: Leg): { speed: number; on: string } | undefined {
  const touched = scene.pairsOf(body).filter((pair) => leg.rows.some((row) => scene.touches(pair, row)));
  const belts = touched.flatMap(({ between }) =>
    scene.mechanism.tracks.filter(({ id, surfaceSpeed }) => between.includes(id) && surfaceSpeed !== 0),
  );
  for (const { id, surfaceSpeed } of belts) {
    if (typeof surfaceSpeed !== 'number') continue;
    const [vx, vy] = chord(scene, id).map((part) => part * surfaceSpeed);
    const isCarried = leg.rows.every((row) => {
      const heading = scene.heading(body, row);
      return Math.hypot(heading.vx - vx, heading.vy - vy) <= 1e-6 * Math.abs(surfaceSpeed);
    });
    if (!isCarried) continue;
    if (touched.length > 1)
      refuse(
        `${touched
          .flatMap(({ between }) => between)
          .filter((each) => each !== body)
          .join(' and ')} share the load of ${body}.`,
      );
    return { speed: Math.abs(surfaceSpeed), on: id };
  }
  return undefined;
}
