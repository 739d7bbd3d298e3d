import type { DemoJob } from './demo-story.ts';

/** What else a shop of two vans has on its list. */
export const EVERYDAY_JOBS: DemoJob[] = [
  {
    name: 'wide',
    machine: 'holloway',
    taken: { day: -48, at: '10:15' },
    complaint: 'It goes cold for minutes at a time.',
    state: 'closed',
    visits: [
      {
        day: -46,
        from: '12:00',
        to: '13:00',
        who: 'ada',
        notes: 'Comes back 15 °F too late: a part with a wider differential. Replaced.',
        removed: { rating: 'HL-155-40', why: 'Wider differential than specified' },
        fitted: { rating: 'HL-155-25', lot: 'B-2190' },
        runs: [
          {
            log: 'closes-low-wide-differential.csv',
            at: '12:20',
            label: 'As found',
            probe: 'K1',
          },
        ],
      },
    ],
  },
  {
    name: 'loose',
    machine: 'dowd',
    taken: { day: -41, at: '11:00' },
    complaint: 'Sometimes it dries, sometimes it does not.',
    state: 'closed',
    visits: [
      {
        day: -40,
        from: '10:00',
        to: '11:00',
        who: 'tom',
        notes: 'Cut-outs early and late with no order: a loose terminal at the thermostat.',
        runs: [
          { log: 'scattered-loose-terminal.csv', at: '10:10', label: 'As found', probe: 'K2' },
        ],
      },
      {
        day: -36,
        from: '10:00',
        to: '10:45',
        who: 'tom',
        notes: 'Terminal crimped anew. Probe battery flat, so read by eye: in band.',
        runs: [{ log: 'hand-timed-in-band.txt', at: '10:15', label: 'By stopwatch', probe: 'K2' }],
      },
    ],
  },
  {
    name: 'narrow',
    machine: 'ash',
    taken: { day: -35, at: '14:45' },
    complaint: 'It clicks all the time.',
    state: 'closed',
    visits: [
      {
        day: -33,
        from: '11:00',
        to: '12:30',
        who: 'ada',
        notes: 'Comes back 15 °F too early: a part with a narrower differential. Replaced.',
        removed: { rating: 'HL-155-15', why: 'Narrower differential than specified' },
        fitted: { rating: 'HL-155-25', lot: 'B-2190' },
        runs: [
          {
            log: 'closes-high-wrong-differential.csv',
            at: '11:30',
            label: 'As found',
            probe: 'K1',
          },
        ],
      },
    ],
  },
  {
    name: 'one-round',
    machine: 'frost',
    taken: { day: -30, at: '08:40' },
    complaint: 'It got very hot once, then it was fine.',
    state: 'closed',
    visits: [
      {
        day: -29,
        from: '09:00',
        to: '10:00',
        who: 'tom',
        notes: 'One round too hot, the next in band. A connector was half off: seated.',
        runs: [{ log: 'mixed-one-outside.csv', at: '09:10', label: 'As found', probe: 'K2' }],
      },
    ],
  },
  {
    name: 'fuse',
    machine: 'ash',
    taken: { day: -14, at: '16:05' },
    complaint: 'Cold air only.',
    state: 'proof-run-due',
    visits: [
      {
        day: -13,
        from: '10:00',
        to: '11:30',
        who: 'ada',
        notes: 'The fuse opened while it was watched. Felt seal worn: seal and fuse replaced.',
        removed: { rating: 'HL-F196', why: 'Opened during the run' },
        fitted: { rating: 'HL-F196', lot: 'F-1192' },
        runs: [
          {
            log: 'heat-lost-fuse-opened.csv',
            at: '10:10',
            label: 'As found',
            probe: 'K1',
            notes: [{ timeS: 780, text: 'Nothing was touched: something opened for good' }],
          },
        ],
      },
      { day: 0, from: '15:30', to: '16:30', who: 'ada', notes: 'Proof run.' },
    ],
  },
  {
    name: 'gas',
    machine: 'bathhouse-gas',
    taken: { day: -13, at: '12:00' },
    complaint: 'Yearly check of the gas machine.',
    state: 'closed',
    visits: [
      {
        day: -12,
        from: '09:00',
        to: '10:30',
        who: 'tom',
        notes: 'In band. Burner clean, tap and joints tight.',
        runs: [
          {
            log: 'in-band-gas-decimal-comma.csv',
            at: '09:15',
            label: 'Yearly check',
            probe: 'K2',
          },
        ],
      },
    ],
  },
  {
    name: 'aged',
    machine: 'frost',
    taken: { day: -12, at: '10:50' },
    complaint: 'Shirts are still damp after an hour.',
    state: 'proof-run-due',
    visits: [
      {
        day: -11,
        from: '14:00',
        to: '15:30',
        who: 'tom',
        notes: 'Opens early: an aged disc. Replaced.',
        removed: { rating: 'HL-155-25', why: 'Aged: opens early' },
        fitted: { rating: 'HL-155-25', lot: 'B-2311' },
        runs: [{ log: 'opens-low-aged-disc.csv', at: '14:15', label: 'As found', probe: 'K2' }],
      },
      {
        day: -2,
        from: '13:00',
        to: '13:45',
        who: 'tom',
        notes: 'Only the spare probe on the van: too coarse to prove it. Come back with K2.',
        runs: [
          {
            log: 'too-close-coarse-probe.csv',
            at: '13:10',
            label: 'With the spare probe',
            probe: 'V4',
          },
        ],
      },
      { day: 0, from: '08:30', to: '09:15', who: 'tom', notes: 'Proof run with K2.' },
    ],
  },
  {
    name: 'drift',
    machine: 'bathhouse',
    taken: { day: -11, at: '15:35' },
    complaint: 'Each load comes out hotter than the last.',
    state: 'waiting-for-part',
    visits: [
      {
        day: -10,
        from: '15:00',
        to: '16:30',
        who: 'ada',
        notes: 'Each cut-out a little higher. Thermostat ordered.',
        runs: [{ log: 'drifting-cut-outs.csv', at: '15:15', label: 'As found', probe: 'K1' }],
      },
      { day: 1, from: '13:00', to: '14:30', who: 'tom', notes: 'Fit HL-155-25, then prove it.' },
    ],
  },
  {
    name: 'coil',
    machine: 'holloway',
    taken: { day: -9, at: '14:00' },
    complaint: 'It gets hot even on the setting without heat.',
    state: 'waiting-for-part',
    visits: [
      {
        day: -7,
        from: '13:30',
        to: '15:00',
        who: 'ada',
        notes: 'Coil to case: open cold, closed hot. Unplugged and tagged, element ordered.',
        runs: [
          {
            log: 'heat-stays-on-grounded-coil.csv',
            at: '13:45',
            label: 'As found',
            probe: 'K1',
            notes: [
              { timeS: 640, text: 'Cut out, but hangs above the return: some heat stays on' },
            ],
          },
        ],
      },
      { day: 1, from: '09:00', to: '10:30', who: 'ada', notes: 'Fit the element, then prove it.' },
    ],
  },
  {
    name: 'element',
    machine: 'dowd',
    taken: { day: -6, at: '13:15' },
    complaint: 'No heat.',
    state: 'waiting-for-part',
    visits: [
      {
        day: -5,
        from: '15:30',
        to: '16:30',
        who: 'tom',
        notes: 'Ten minutes and hardly any rise: element open. One on the way.',
        runs: [{ log: 'no-heat-element-open.csv', at: '15:50', label: 'As found', probe: 'K2' }],
      },
      {
        day: -2,
        from: '09:00',
        to: '10:00',
        who: 'tom',
        notes: 'The element sent has less than half the rated watts. The right one is ordered.',
        runs: [
          {
            log: 'below-cut-out-weak-heat.csv',
            at: '09:10',
            label: 'With the element sent',
            probe: 'K2',
          },
        ],
      },
      { day: 0, from: '15:30', to: '17:00', who: 'tom', notes: 'Fit the element, then prove it.' },
    ],
  },
  {
    name: 'brown-shirts',
    machine: 'strand',
    taken: { day: -4, at: '17:20' },
    complaint: 'Smells of burning, and the shirts are brown.',
    state: 'waiting-for-part',
    visits: [
      {
        day: -3,
        from: '13:00',
        to: '14:30',
        who: 'tom',
        notes: 'No cut-out at all, heat off by hand both times. Unplugged and tagged.',
        runs: [
          { log: 'hand-timed-runaway.csv', at: '13:10', label: 'By stopwatch', probe: 'K2' },
          {
            log: 'runaway-from-cold.csv',
            at: '13:50',
            label: 'With the logger',
            probe: 'K2',
            notes: [{ timeS: 749, text: 'Heat off by hand' }],
          },
        ],
      },
      { day: 0, from: '13:30', to: '14:30', who: 'tom', notes: 'Fit HL-155-25, then prove it.' },
    ],
  },
  {
    name: 'lint-light',
    machine: 'marlow',
    taken: { day: -1, at: '17:05' },
    complaint: 'The lint light stays on.',
    state: 'booked',
    visits: [{ day: 1, from: '11:00', to: '11:45', who: 'tom', notes: 'Hester is in until noon.' }],
  },
];
