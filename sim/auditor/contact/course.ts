import { nearestOnRun, newFoot, type Foot, type SmoothRun, type TrackPath } from '../../geometry/index.js';

/** A run of a course: the track it is of, and which side of its path is free (+1 left, −1 right, 0 both). */
export interface Stretch {
  run: SmoothRun;
  track: number;
  free: 1 | -1 | 0;
  /** +1 where the course goes along the run's path, −1 against it. */
  sense: 1 | -1;
}

/** Runs that pass smoothly into each other; a body on one comes onto the next without an impact. */
export type Course = readonly Stretch[];

/** Gathers all runs of all tracks into courses, by following their smooth links both ways. */
export function coursesOf(paths: readonly TrackPath[]): Course[] {
  const trackOf = new Map<SmoothRun, number>();
  paths.forEach((path, track) => path.runs.forEach((run) => trackOf.set(run, track)));
  const taken = new Set<SmoothRun>();
  const courses: Course[] = [];
  for (const run of trackOf.keys()) {
    if (taken.has(run)) continue;
    const course: Stretch[] = [];
    gather(run, 1, course, taken, (of) => {
      const track = trackOf.get(of) ?? 0;
      const { side } = paths[track];
      return { track, free: side === 'left' ? 1 : side === 'right' ? -1 : 0 };
    });
    courses.push(course);
  }
  return courses;
}

function gather(
  run: SmoothRun,
  sense: 1 | -1,
  course: Stretch[],
  taken: Set<SmoothRun>,
  describe: (run: SmoothRun) => Pick<Stretch, 'track' | 'free'>,
): void {
  if (taken.has(run)) return;
  taken.add(run);
  course.push({ run, sense, ...describe(run) });
  const { next, previous } = run;
  if (next) gather(next.run, next.at === 'start' ? sense : flip(sense), course, taken, describe);
  if (previous) gather(previous.run, previous.at === 'end' ? sense : flip(sense), course, taken, describe);
}

const flip = (sense: 1 | -1): 1 | -1 => (sense === 1 ? -1 : 1);

/** A foot on a course. `isPastEnd`: held at an end that nothing continues. */
export interface CourseFoot {
  foot: Foot;
  stretch: number;
  isPastEnd: boolean;
}

const trial = newFoot();

/** Nearest point of a course to (x, y). */
export function footOn(course: Course, x: number, y: number, out: CourseFoot): void {
  let best = Infinity;
  for (let i = 0; i < course.length; i += 1) {
    nearestOnRun(course[i].run, x, y, trial, i === out.stretch ? out.foot.piece : 0);
    const away = Math.abs(trial.distance);
    if (away >= best) continue;
    best = away;
    out.stretch = i;
    Object.assign(out.foot, trial);
  }
  const { run } = course[out.stretch];
  out.isPastEnd = (out.foot.atStart && !run.previous) || (out.foot.atEnd && !run.next);
}
