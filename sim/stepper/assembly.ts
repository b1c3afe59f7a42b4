import type { Moment } from '../mechanism/kinds/load.js';
import type { Mechanism } from '../mechanism/model.js';
import type { BookedAccount } from './books.js';
import { ContactManager } from './contact/manager.js';
import type { Element } from './element.js';
import { DamperElement } from './kinds/damper.js';
import { DriveElement } from './kinds/drive.js';
import type { JointElement } from './kinds/joint.js';
import { LoadElement, type Timetable } from './kinds/load.js';
import { buildJoint, buildSpring } from './kinds/index.js';
import type { SpringElement } from './kinds/spring.js';
import { buildScene, poseBodies, type Scene } from './scene.js';

/** The mechanism as the stepper runs it. */
export interface Assembly {
  scene: Scene;
  manager: ContactManager;
  elements: Element[];
  joints: JointElement[];
  springs: SpringElement[];
  dampers: DamperElement[];
  gravity: BookedAccount[];
}

/** Builds every element of a mechanism that `unsupported` has nothing against. */
export function assemble(mechanism: Mechanism, timetable: Timetable): Assembly {
  const scene = buildScene(mechanism);
  const { state } = scene;
  poseBodies(scene, state.x, state.y, state.a);
  const isHeavy = scene.gravity.x !== 0 || scene.gravity.y !== 0;
  const gravity = isHeavy ? scene.ids.map((id) => scene.books.open('gravity', id, [id], { stored: true })) : [];
  const springs = mechanism.springs.map((spring) => buildSpring(scene, spring));
  for (const spring of springs) spring.begin();
  const dampers = mechanism.dampers.map((damper) => new DamperElement(scene, damper));
  const loads = mechanism.loads.map((load) => new LoadElement(scene, load, timetable));
  const joints = mechanism.joints.map((joint) => buildJoint(scene, joint));
  const drives = mechanism.drives.flatMap((drive) => {
    const joint = joints.find(({ id }) => id === drive.on);
    return joint ? [new DriveElement(scene, drive, joint, timetable)] : [];
  });
  const manager = new ContactManager(scene);
  return {
    scene,
    manager,
    elements: [...springs, ...loads, ...drives, ...dampers, ...joints],
    joints,
    springs,
    dampers,
    gravity,
  };
}

/** Whether a moment has come, by the time [s] and the stations reached so far. */
export function hasCome(moment: Moment, time: number, stationTime: (id: string) => number | undefined): boolean {
  if ('time' in moment) return time >= moment.time * (1 - 1e-12);
  return stationTime(moment.station) !== undefined;
}
