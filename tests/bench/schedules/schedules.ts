import { closeBadLine, openBadLine } from '#tests/browser/support/bad-day.ts';
import { playBadSchedule, type Played } from '#tests/browser/support/bad-schedule.ts';
import { ownServer } from '#tests/browser/support/own-server.ts';

/**
 * `schedules 200 1001`: so many bad days from this seed on, each in a browser of its own that is really killed, against
 * a server that is too. A third word names the folder that the build lies in.
 */
export async function bench([count = '5', from = '1', built = 'dist']: string[]): Promise<void> {
  const server = await ownServer(built);
  await server.start();
  const line = await openBadLine(server);
  const played: Played[] = [];
  for (let seed = Number(from); seed < Number(from) + Number(count); seed++) {
    const day = await playBadSchedule(line, seed);
    if (!server.isUp()) await server.start();
    played.push(day);
    console.log(lineOf(day));
  }
  console.log(summaryOf(played));
  console.table(timesMet(line.relay.met));
  await closeBadLine(line);
}

function lineOf({ seed, shown, lost, doubled, problems, ms }: Played): string {
  const seconds = (ms / 1000).toFixed(1);
  const words = `seed ${seed}: ${shown} readings, ${lost.length} lost, ${doubled.length} doubled, ${seconds} s`;
  return [words, ...problems].join('\n  ');
}

function summaryOf(played: Played[]): string {
  const sum = (of: (day: Played) => number) => played.reduce((all, day) => all + of(day), 0);
  const kills = sum(({ steps }) => steps.filter((step) => step.includes('kill')).length);
  return [
    `\n${played.length} schedules, ${sum(({ steps }) => steps.length)} things that happened, ${kills} of them kills`,
    `${sum(({ shown }) => shown)} readings shown, ${sum(({ lost }) => lost.length)} lost, ${sum(({ doubled }) => doubled.length)} doubled`,
    `${played.filter(({ problems }) => problems.length > 0).length} schedules with something else that was not right`,
  ].join('\n');
}

function timesMet(met: readonly string[]): Record<string, number> {
  const counts: Record<string, number> = {};
  for (const fate of met) counts[fate] = (counts[fate] ?? 0) + 1;
  return counts;
}
