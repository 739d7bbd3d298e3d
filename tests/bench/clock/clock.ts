import { ownServer } from '#tests/browser/support/own-server.ts';
import { MANNERS, playCourse, type Course } from '#tests/browser/support/clock-course.ts';

/** How far the run's time may be off, ms. */
const MOST_MS = 50;

/**
 * `clock 60`: elapsed time against this process's monotonic clock after 60 minutes seen, hidden, frozen, reloaded, or
 * killed and opened again, all at once in browsers of their own.
 */
export async function bench([minutes = '1', built = 'dist']: string[]): Promise<void> {
  const server = await ownServer(built);
  await server.start();
  const lastsS = Number(minutes) * 60;
  const courses: Promise<Course>[] = [];
  for (const manner of MANNERS) {
    const course = playCourse(server.url, manner, lastsS);
    courses.push(course);
    // One after the other: five browsers that open at once keep each other from it.
    await Promise.race([course, begun()]);
  }
  const played = await Promise.allSettled(courses);
  await server.remove();
  console.log(`\nElapsed time after ${minutes} min, against a monotonic clock outside the browser`);
  console.table(played.flatMap((each) => (each.status === 'fulfilled' ? [rowOf(each.value)] : [])));
  for (const each of played) if (each.status === 'rejected') console.log(each.reason);
}

function begun(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, 15_000));
}

function rowOf({ manner, lastedS, before, after, asleepS }: Course) {
  return {
    page: manner,
    'lasted, s': lastedS.toFixed(1),
    'error before, ms': before.errorMs.toFixed(1),
    'error after, ms': after.errorMs.toFixed(1),
    'known to ±, ms': after.uMs.toFixed(1),
    'from the phone’s clock, s': asleepS.map((span) => span.toFixed(1)).join(' ') || 'none',
    holds: Math.abs(after.errorMs) <= MOST_MS ? 'yes' : 'NO',
  };
}
