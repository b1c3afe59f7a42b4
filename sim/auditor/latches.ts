import type { Mechanism } from '../mechanism/model.js';
import type { StationWatch } from '../recording/station-watch.js';
import type { Assembly } from './assembly.js';
import type { JointParts } from './kinds/joint.js';
import { hasCome } from './moments.js';
import { forceUnit } from './units.js';

/** The latches of a mechanism: which still hold, and what makes them let go. */
export class Latches {
  private readonly released = new Set<string>();

  constructor(
    private readonly mechanism: Mechanism,
    private readonly assembly: Assembly,
    private readonly stations: StationWatch,
  ) {}

  private jointOf(id: string): JointParts | undefined {
    const latch = this.mechanism.latches.find((candidate) => candidate.id === id);
    return this.assembly.joints.find((joint) => joint.id === latch?.joint);
  }

  /** Those whose time or station has come [s]. */
  due(seconds: number): string[] {
    return this.mechanism.latches.flatMap(({ id, releasesAt }) => {
      if (this.released.has(id) || 'force' in releasesAt || !this.jointOf(id)) return [];
      return hasCome(releasesAt, seconds, this.stations) ? [id] : [];
    });
  }

  /** Those that let go by force, with how much is left until then. */
  watched(): { id: string; left: () => number }[] {
    return this.mechanism.latches.flatMap(({ id, releasesAt }) => {
      const joint = this.jointOf(id);
      if (this.released.has(id) || !joint || !('force' in releasesAt)) return [];
      const limit = releasesAt.force / forceUnit(this.assembly.system.units);
      return [{ id, left: () => limit - joint.reactionSize() }];
    });
  }

  /** Lets one go; `tell` is called first, while the joint still holds. */
  release(id: string, tell: () => void): void {
    const joint = this.jointOf(id);
    if (!joint || this.released.has(id)) return;
    this.released.add(id);
    tell();
    joint.isReleased = true;
  }
}
