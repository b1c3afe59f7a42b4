import { checkDrives } from '../resolve/drive.js';
import { checkOrder } from '../resolve/station.js';
import type { Checked } from './checked.js';
import { checkContacts } from './contacts.js';
import { checkCriteria } from './criteria.js';
import { checkJoints } from './joints.js';
import { checkMaterials } from './materials.js';
import { checkOverlaps } from './overlaps.js';
import { checkRun } from './run.js';
import { checkStations } from './stations.js';

/** What no field table can tell: whether the elements of a mechanism make sense together. */
export function checkMechanism(checked: Checked): void {
  const { mechanism, places, reading } = checked;
  checkMaterials(checked);
  checkContacts(checked);
  checkOverlaps(checked);
  checkJoints(checked);
  checkDrives(mechanism.drives, places, reading);
  checkOrder(mechanism.stations, places, reading);
  checkStations(checked);
  checkCriteria(checked);
  checkRun(checked);
}
