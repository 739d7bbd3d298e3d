import 'fake-indexeddb/auto';
import { randomUUID } from 'node:crypto';
import { expect, test } from 'vitest';
import type { KeptThing } from '#client/device/device-db.ts';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import { createPhone, type Fate } from './phone.ts';

// `SCHEDULES=200 npx vitest run tests/client/device/schedules.test.ts` is the full run; `FROM=` takes up a seed again.
const SCHEDULES = Number(process.env['SCHEDULES'] ?? 20);
const FIRST_SEED = Number(process.env['FROM'] ?? 1);
const STEPS = 30;
const FATES: Fate[] = ['arrives', 'lost', 'answer-lost', 'twice', 'killed'];

const app = await createTestApp();
const owner = await app.agent('owner');
const technician = await app.agent('technician');

/** Numerical Recipes' 32-bit generator: the same seed is the same schedule. */
function chances(seed: number) {
  let state = seed >>> 0;
  const next = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 4294967296;
  };
  for (let i = 0; i < 8; i++) next();
  return <T>(choices: readonly T[]): T => choices[Math.floor(next() * choices.length)]!;
}

const STEP_KINDS = ['keep', 'keep', 'keep', 'send', 'both', 'reload', 'down', 'up'] as const;

/** Each edit is made on the one before: lost, doubled or out of order, the next would be a conflict. */
async function playSchedule(seed: number) {
  const { visit } = await bookVisit(owner, technician);
  const pick = chances(seed);
  const phone = createPhone(technician, randomUUID());
  const kept: KeptThing[] = [];
  const pending: Promise<unknown>[] = [];
  const twoTabs = [0, 1] as const;

  for (let step = 0; step < STEPS; step++) {
    const at = pick(twoTabs);
    const { device, sender } = await phone.tab(at);
    switch (pick(STEP_KINDS)) {
      case 'keep': {
        const basedOn = kept.at(-1)?.id ?? '';
        const payload = { visitId: visit.id, basedOn, notes: `Note ${kept.length + 1}` };
        kept.push(await device.keep({ kind: 'visit-edit', payload, chain: `visit:${visit.id}` }));
        break;
      }
      case 'send':
        phone.fates.push(pick(FATES), pick(FATES));
        await sender.send();
        break;
      case 'both':
        phone.fates.push(pick(FATES), pick(FATES), pick(FATES));
        // Not waited for: the next steps happen meanwhile.
        for (const other of twoTabs) pending.push((await phone.tab(other)).sender.send());
        break;
      case 'reload':
        await Promise.all(pending.splice(0));
        await phone.reload(at);
        break;
      case 'down':
        phone.setDown(true);
        break;
      case 'up':
        phone.setDown(false);
    }
  }

  await Promise.all(pending);
  phone.setDown(false);
  phone.fates.length = 0;
  const last = await phone.tab(0);
  const outcome = await last.sender.send();
  const left = await last.device.things.count(technician.person.id);
  const deviceId = await last.device.things.deviceId();
  await phone.close();
  return { visitId: visit.id, kept, outcome, left, deviceId };
}

test(
  `nothing is lost, doubled or out of order in ${SCHEDULES} schedules of a bad day from seed ${FIRST_SEED}`,
  async () => {
    for (let seed = FIRST_SEED; seed < FIRST_SEED + SCHEDULES; seed++) {
      const { visitId, kept, outcome, left, deviceId } = await playSchedule(seed);
      const received = await app
        .db('received_things')
        .where({ device_id: deviceId })
        .orderBy('kept_order');
      const visit = await owner.get(`/api/visits/${visitId}`);

      expect({
        seed,
        outcome,
        left,
        received: received.map(({ id, answer }) => [id, JSON.parse(answer).status]),
        notes: visit.body.notes,
      }).toEqual({
        seed,
        outcome: 'sent',
        left: { unsent: 0, conflict: 0, refused: 0 },
        received: kept.map(({ id }) => [id, 'applied']),
        notes: kept.length === 0 ? '' : `Note ${kept.length}`,
      });
    }
  },
  60_000 + SCHEDULES * 5_000,
);
