import type { NewMachine } from '#shared/schemas/homes.ts';

export type DemoMachine = {
  key: string;
  made: Omit<NewMachine, 'homeId'>;
  specified: string;
  /** What was in it before the first job. */
  thermostat: string;
};

export type DemoHome = {
  customer: string;
  phone: string;
  notes: string;
  address: string;
  access: string;
  machines: DemoMachine[];
};

const MAKES = new Map([
  ['C', 'Calder'],
  ['N', 'Norrin'],
  ['V', 'Vesper'],
]);

type Named = [key: string, model: string, serial: string, place: string];

function electric(...[key, model, serial, place]: Named): DemoMachine {
  const make = MAKES.get(model.charAt(0)) ?? '';
  const power = { ratedVolts: 240, ratedWatts: 5600 };
  const made = { make, model, serial, place, fuel: 'electric', control: 'thermostat' } as const;
  const thermostat = 'HL-155-25';
  return { key, made: { ...made, ...power }, specified: thermostat, thermostat };
}

function gas(...named: Named): DemoMachine {
  const { key, made } = electric(...named);
  const power = { ratedVolts: 120, ratedWatts: null };
  const thermostat = 'HL-155-G';
  return { key, made: { ...made, ...power, fuel: 'gas' }, specified: thermostat, thermostat };
}

export const DEMO_HOMES: DemoHome[] = [
  {
    customer: 'Hester Marlow',
    phone: '555-0111',
    notes: 'Marlow Guest House, nine rooms. Ask for Hester, not the desk.',
    address: '2 Ferry Row',
    access: 'Side door by the bins; the laundry is behind the kitchen.',
    machines: [electric('marlow', 'C540', 'C540-31187', 'Laundry room')],
  },
  {
    customer: 'Rosalind Peake',
    phone: '555-0112',
    notes: '',
    address: '14 Weir Street',
    access: 'Machine is in the hall cupboard; the breaker box is on the landing.',
    machines: [electric('peake', 'N30', 'N30-20914', 'Hall cupboard')],
  },
  {
    customer: 'Otis Verney',
    phone: '555-0113',
    notes: 'Works nights: not before half past eight.',
    address: '14 Tanners Row',
    access: 'Basement, low beam at the foot of the stairs.',
    machines: [electric('verney', 'C520', 'C520-11840', 'Basement')],
  },
  {
    customer: 'Delphine Osgood',
    phone: '555-0114',
    notes: '',
    address: '3 Quarry Cottages',
    access: 'Garage. Two dogs, friendly.',
    machines: [electric('osgood', 'N22', 'N22-07731', 'Garage')],
  },
  {
    customer: 'Basil Thornbury',
    phone: '555-0115',
    notes: 'Hard of hearing: ring twice.',
    address: '27 Millrace Court',
    access: 'Second floor, no lift. Closet with a folding door.',
    machines: [electric('thornbury', 'C520', 'C520-12266', 'Closet')],
  },
  {
    customer: 'Mabel Carrow',
    phone: '555-0116',
    notes: '',
    address: '8 Larch End',
    access: 'Kitchen, under the counter.',
    machines: [electric('carrow', 'V7', 'V7-44102', 'Kitchen')],
  },
  {
    customer: 'Gideon Strand',
    phone: '555-0117',
    notes: '',
    address: '41 Harbour Steps',
    access: 'Key under the third pot.',
    machines: [electric('strand', 'N30', 'N30-18825', 'Back porch')],
  },
  {
    customer: 'Petra Holloway',
    phone: '555-0118',
    notes: '',
    address: '19 Orchard Bank',
    access: 'Utility room, tight: pull the washer out first.',
    machines: [
      { ...electric('holloway', 'V7', 'V7-39570', 'Utility room'), thermostat: 'HL-155-40' },
    ],
  },
  {
    customer: 'Tessford Bathhouse',
    phone: '555-0119',
    notes: 'Ruben Oakes looks after the machines.',
    address: '6 Bellfounders Yard',
    access: 'Yard gate, then the boiler house. Gas tap is behind the left machine.',
    machines: [
      gas('bathhouse-gas', 'V12', 'V12-00418', 'Boiler house, left'),
      electric('bathhouse', 'C620', 'C620-05093', 'Boiler house, right'),
    ],
  },
  {
    customer: 'Wendel Ash',
    phone: '555-0120',
    notes: '',
    address: '33 Kiln Lane',
    access: '',
    machines: [{ ...electric('ash', 'C520', 'C520-10377', 'Cellar'), thermostat: 'HL-155-15' }],
  },
  {
    customer: 'Junia Frost',
    phone: '555-0121',
    notes: '',
    address: '5 Saddlers Close',
    access: 'Ring at number 7 if nobody is in.',
    machines: [electric('frost', 'N22', 'N22-05214', 'Bathroom')],
  },
  {
    customer: 'Emeric Dowd',
    phone: '555-0122',
    notes: 'Pays on the day.',
    address: '22 Chapel Rise',
    access: '',
    machines: [electric('dowd', 'V5', 'V5-28009', 'Scullery')],
  },
];
