import type { DemoJob } from './demo-story.ts';

/** A guest house whose duct was crushed in a renovation. */
const CRUSHED_DUCT: DemoJob[] = [
  {
    name: 'duct',
    machine: 'marlow',
    taken: { day: -17, at: '08:20' },
    complaint: 'Towels take three rounds to dry since the new wall went up.',
    state: 'fixed',
    visits: [
      {
        day: -16,
        from: '13:00',
        to: '14:30',
        who: 'tom',
        notes: 'Duct crushed flat where the new wall crosses it. The builder puts in smooth pipe.',
        runs: [
          {
            log: 'limit-cycling-crushed-duct.csv',
            at: '13:20',
            label: 'As found',
            probe: 'K2',
            notes: [
              { timeS: 420, text: 'Heat cuts out far below 155: the limit, not the thermostat' },
            ],
          },
          {
            log: 'in-band-duct-off.csv',
            at: '13:50',
            label: 'Duct off',
            probe: 'K2',
            notes: [{ timeS: 600, text: 'Duct off: full rounds, at the thermostat' }],
          },
        ],
      },
      {
        day: -9,
        from: '14:00',
        to: '15:00',
        who: 'tom',
        notes: 'Smooth pipe is in, flap opens fully. Proven.',
        runs: [
          {
            log: 'in-band-duct-repaired.csv',
            at: '14:10',
            label: 'After the new pipe',
            probe: 'K2',
            notes: [
              { timeS: 30, text: 'New smooth pipe, nothing else changed' },
              { timeS: 560, text: 'Cuts out near 155 and comes back near 130' },
            ],
            sharedForDays: 60,
          },
        ],
      },
    ],
  },
];

/** A heater relay that sticks after the third cycle: proven in its first repair, and back a month later. */
const STICKING_RELAY: DemoJob[] = [
  {
    name: 'relay',
    machine: 'peake',
    taken: { day: -26, at: '09:10' },
    complaint: 'It stopped heating in the middle of a load.',
    state: 'closed',
    visits: [
      {
        day: -25,
        from: '10:00',
        to: '11:30',
        who: 'tom',
        notes:
          'Fuse open, contacts of the heater relay pitted. Relay and fuse replaced, run in band.',
        removed: { rating: 'HL-F196', why: 'Open' },
        fitted: { rating: 'HL-F196', lot: 'F-1180' },
        partsAt: '10:40',
        runs: [
          {
            log: 'too-short-stopped-early.csv',
            at: '10:20',
            label: 'First look',
            probe: 'K2',
          },
          {
            log: 'in-band-relay-replaced.csv',
            at: '10:50',
            label: 'Proof run',
            probe: 'K2',
          },
        ],
      },
    ],
  },
  {
    name: 'relay-again',
    machine: 'peake',
    taken: { day: -2, at: '16:40' },
    complaint: 'Too hot to touch, then it stopped. You were here last month.',
    callsBack: 'relay',
    state: 'waiting-for-part',
    visits: [
      {
        day: -1,
        from: '08:30',
        to: '10:00',
        who: 'tom',
        notes:
          'Three rounds, then the relay sticks and the heat keeps coming. Unplugged and tagged.',
        runs: [
          {
            log: 'runaway-relay-sticks.csv',
            at: '08:50',
            label: 'As found',
            probe: 'K2',
            notes: [
              { timeS: 537, text: 'Click: the thermostat opened' },
              { timeS: 760, text: 'Heat keeps coming' },
              { timeS: 1063, text: 'Heat off by hand' },
            ],
          },
        ],
      },
      {
        day: 0,
        from: '10:30',
        to: '11:30',
        who: 'tom',
        notes: 'Fit the new relay, then prove it.',
      },
    ],
  },
];

/** A thermostat of the wrong rating from a mixed box, traced by its lot to three homes. */
const MIXED_LOT = { rating: 'HL-175-25', lot: 'B-2207' };
const MIXED_BOX: DemoJob[] = [
  {
    name: 'box-a',
    machine: 'verney',
    taken: { day: -22, at: '10:05' },
    complaint: 'No heat at all.',
    state: 'closed',
    visits: [
      {
        day: -21,
        from: '09:00',
        to: '10:00',
        who: 'tom',
        notes: 'Thermostat open when cold: replaced. Felt warm air, no run made.',
        removed: { rating: 'HL-155-25', why: 'Open when cold' },
        fitted: MIXED_LOT,
      },
    ],
  },
  {
    name: 'box-b',
    machine: 'osgood',
    taken: { day: -21, at: '15:10' },
    complaint: 'It heats now and then.',
    state: 'closed',
    visits: [
      {
        day: -20,
        from: '11:00',
        to: '12:00',
        who: 'tom',
        notes: 'Thermostat replaced. Felt warm air, no run made.',
        removed: { rating: 'HL-155-25', why: 'Opens and closes at random' },
        fitted: MIXED_LOT,
      },
    ],
  },
  {
    name: 'box-c',
    machine: 'thornbury',
    taken: { day: -20, at: '13:30' },
    complaint: 'It runs cold after ten minutes.',
    state: 'closed',
    visits: [
      {
        day: -19,
        from: '14:00',
        to: '15:00',
        who: 'tom',
        notes: 'Thermostat replaced. Felt warm air, no run made.',
        removed: { rating: 'HL-155-25', why: 'Opens early' },
        fitted: MIXED_LOT,
      },
    ],
  },
  {
    name: 'box-a-again',
    machine: 'verney',
    taken: { day: -7, at: '09:40' },
    complaint: 'Shirts come out scorched since you were here.',
    callsBack: 'box-a',
    state: 'proof-run-due',
    visits: [
      {
        day: -6,
        from: '10:00',
        to: '11:30',
        who: 'ada',
        notes:
          'The disc is marked 175, its bag said 155: lot B-2207. Right one fitted, proof run due.',
        removed: { rating: 'HL-175-25', why: 'Another rating than its bag says: opens 20 °F high' },
        fitted: { rating: 'HL-155-25', lot: 'B-2311' },
        runs: [
          {
            log: 'opens-high-wrong-thermostat-a.csv',
            at: '10:15',
            label: 'As found',
            probe: 'K1',
            notes: [{ timeS: 600, text: 'Every round 20 too hot, and always the same' }],
          },
        ],
      },
      { day: 0, from: '08:30', to: '09:30', who: 'ada', notes: 'Proof run.' },
    ],
  },
  {
    name: 'box-b-again',
    machine: 'osgood',
    taken: { day: -5, at: '11:20' },
    complaint: 'The garage smells hot when it runs.',
    callsBack: 'box-b',
    state: 'waiting-for-part',
    visits: [
      {
        day: -4,
        from: '16:00',
        to: '17:00',
        who: 'ada',
        notes: 'Lot B-2207 again. Not to be used until the right thermostat is in.',
        runs: [
          {
            log: 'opens-high-wrong-thermostat-b.csv',
            at: '16:15',
            label: 'As found',
            probe: 'K1',
          },
        ],
      },
      { day: 0, from: '11:00', to: '12:30', who: 'ada', notes: 'Fit HL-155-25, then prove it.' },
    ],
  },
  {
    name: 'box-c-again',
    machine: 'thornbury',
    taken: { day: -4, at: '08:50' },
    complaint: 'Called by us: a thermostat of lot B-2207 is in his machine.',
    callsBack: 'box-c',
    state: 'waiting-for-part',
    visits: [
      {
        day: -3,
        from: '08:30',
        to: '09:30',
        who: 'ada',
        notes: 'The third one of lot B-2207. Not to be used until the right one is in.',
        runs: [
          {
            log: 'opens-high-wrong-thermostat-c.csv',
            at: '08:45',
            label: 'As found',
            probe: 'K1',
          },
        ],
      },
      { day: 0, from: '14:00', to: '15:00', who: 'ada', notes: 'Fit HL-155-25, then prove it.' },
    ],
  },
];

/** A sound machine with a damp load. */
const DAMP_LOAD: DemoJob[] = [
  {
    name: 'damp',
    machine: 'carrow',
    taken: { day: -9, at: '09:30' },
    complaint: 'It takes for ever with towels.',
    state: 'closed',
    visits: [
      {
        day: -8,
        from: '11:00',
        to: '13:00',
        who: 'ada',
        notes: 'Nothing wrong with the heat: six dripping towels. Shown how to spin them longer.',
        runs: [
          {
            log: 'damp-load-sound.csv',
            at: '11:20',
            label: 'Six damp towels',
            probe: 'K1',
            notes: [
              { timeS: 700, text: 'Still drying: the exhaust stays flat while there is water' },
            ],
          },
          {
            log: 'in-band-electric-iso.csv',
            at: '12:15',
            label: 'Empty drum',
            probe: 'K1',
            notes: [{ timeS: 686, text: 'Click, and the heat is off' }],
          },
        ],
      },
    ],
  },
];

export const FOUR_STORIES: DemoJob[] = [
  ...CRUSHED_DUCT,
  ...STICKING_RELAY,
  ...MIXED_BOX,
  ...DAMP_LOAD,
];
