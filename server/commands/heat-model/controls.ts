import type { Random } from './random.ts';
import type { Disc, Faults, Machine } from './machine.ts';
import type { Nodes } from './simulate-run.ts';

/** A change of the heater's power: which way, and what did it. */
export type Switch = {
  timeS: number;
  /** From then on, and by how much more than before, W. */
  powerW: number;
  changeW: number;
  cause: 'disc' | 'limit' | 'person' | 'one-shot';
};

/** The parts that decide whether the heater has power, with their faults. */
export function createControls(machine: Machine, faults: Faults, random: Random) {
  const switches: Switch[] = [];
  const clicksS: number[] = [];
  let discClosed = true;
  let limitClosed = true;
  let lostForGood = false;
  let off = false;
  let openings = 0;
  let opensC = nextOpening(1);
  let cutAtS = -Infinity;
  let litAtS = machine.relightS;
  let lastW = 0;
  let openWas = false;

  function nextOpening(opening: number): number {
    const lateK = faults.oneLate?.opening === opening ? faults.oneLate.byK : 0;
    const movedK = faults.driftK * (opening - 1) + faults.scatterK * random.gaussian();
    return machine.disc.opensC + movedK + lateK;
  }

  function moveDisc(timeS: number, discC: number): void {
    if (discClosed && discC >= opensC) {
      discClosed = false;
      openings++;
      clicksS.push(timeS);
      // The relay lets go late, and later as it warms.
      cutAtS = timeS + faults.relayLateS * (openings - 1);
      opensC = nextOpening(openings + 1);
    } else if (!discClosed && discC <= machine.disc.closesC) {
      discClosed = true;
      litAtS = timeS + machine.relightS;
    }
  }

  function controlledW(timeS: number): number {
    const stuck = openings > faults.relaySticksAfter;
    const asked = stuck || (discClosed ? timeS >= litAtS : timeS < cutAtS);
    if (!asked || !limitClosed) return 0;
    return machine.powerW * faults.heaterShare;
  }

  return {
    switches,
    clicksS,
    turnOff() {
      off = true;
    },
    /** Power of the heater in this step, W. */
    powerW(timeS: number, nodes: Nodes): number {
      moveDisc(timeS, nodes.discC);
      const limitWas = limitClosed;
      limitClosed = nextState(limitClosed, nodes.boxC, machine.boxLimit);
      // After the limit closes, a gas burner warms its igniter again.
      if (!limitWas && limitClosed) litAtS = timeS + machine.relightS;
      const fuseOpens = nodes.fuseC >= machine.fuse.opensC || timeS >= faults.opensForGoodS;
      lostForGood ||= fuseOpens;

      const leaks = openings >= faults.groundedAfter ? faults.groundedW : 0;
      const fedW = Math.max(controlledW(timeS), leaks);
      const open = isDoorOpen(faults, timeS);
      const nowW = lostForGood || off || open ? 0 : fedW;
      if (nowW !== lastW) {
        const byPerson = off || open !== openWas;
        const byLimit = limitWas !== limitClosed;
        const cause = byPerson ? 'person' : lostForGood ? 'one-shot' : byLimit ? 'limit' : 'disc';
        switches.push({ timeS, powerW: nowW, changeW: nowW - lastW, cause });
        lastW = nowW;
      }
      openWas = open;
      return nowW;
    },
    /** What the bias heater adds to the disc's surroundings, K: it has power while the disc is closed. */
    biasK: () => (discClosed ? machine.biasK : 0),
  };
}

export function isDoorOpen({ doorOpen }: Faults, timeS: number): boolean {
  return doorOpen.some(({ fromS, toS }) => timeS >= fromS && timeS < toS);
}

function nextState(closed: boolean, tempC: number, disc: Disc): boolean {
  if (closed) return tempC < disc.opensC;
  return tempC <= disc.closesC;
}
