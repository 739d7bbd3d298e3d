import { createDevice, type Device } from '#client/device/device.ts';
import { createSender, SendError, type PostSendings, type Sender } from '#client/device/sender.ts';
import type { Agent } from '#tests/support/test-app.ts';
import { createWebLocks } from '#tests/support/web-locks.ts';

/** What happens to one request on its way. `killed`: the page goes once the server has done it. */
export type Fate = 'arrives' | 'lost' | 'answer-lost' | 'twice' | 'killed';

type Tab = { device: Device; sender: Sender; isDead: boolean };

/** One phone with two tabs on one store, and a line to the real server whose faults are told beforehand. */
export function createPhone(agent: Agent, name: string) {
  const locks = createWebLocks();
  const fates: Fate[] = [];
  let isDown = false;
  const tabs: Tab[] = [];

  async function post(sendings: Parameters<PostSendings>[0]) {
    const answer = await agent.post('/api/sendings').send(sendings);
    if (answer.status !== 200) throw new SendError('broken', `${answer.status}`);
    return answer.body;
  }

  async function openTab(): Promise<Tab> {
    const device = createDevice({ name });
    await device.open({ id: agent.person.id, name: agent.person.name }, {});
    const tab: Tab = { device, isDead: false, sender: createSender({ device, locks, post: line }) };
    async function line(sendings: Parameters<PostSendings>[0]) {
      const fate = fates.shift() ?? 'arrives';
      if (isDown || fate === 'lost') throw new SendError('unreachable', 'no line');
      const answer = await post(sendings);
      if (fate === 'twice') return post(sendings);
      if (fate === 'answer-lost') throw new SendError('unreachable', 'no line');
      if (fate === 'killed') {
        tab.isDead = true;
        throw new SendError('broken', 'the page is gone');
      }
      return answer;
    }
    return tab;
  }

  return {
    fates,
    setDown: (down: boolean) => (isDown = down),
    /** A tab; one that was killed opens anew. */
    async tab(at: number): Promise<Tab> {
      const known = tabs[at];
      if (known && !known.isDead) return known;
      await known?.device.close();
      return (tabs[at] = await openTab());
    },
    async reload(at: number): Promise<void> {
      await tabs[at]?.device.close();
      tabs[at] = await openTab();
    },
    async close(): Promise<void> {
      for (const { device } of tabs) await device.close();
    },
  };
}
