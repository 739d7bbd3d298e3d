import type { Role, Shop } from '#shared/schemas/people.ts';

export const DEMO_PASSWORD = 'tessford-dryers-4870';

export const DEMO_SHOP: Shop = {
  name: 'Harrow Lane Appliance Repair',
  town: 'Tessford',
  phone: '555-0100',
  email: 'desk@harrowlane.example',
  zone: 'America/New_York',
  unit: 'F',
  minCycles: 3,
};

export type DemoPerson = { key: string; name: string; email: string; role: Role };

export const DEMO_PEOPLE = [
  { key: 'nora', name: 'Nora Whitlock', email: 'nora.whitlock@harrowlane.example', role: 'owner' },
  { key: 'imelda', name: 'Imelda Crane', email: 'imelda.crane@harrowlane.example', role: 'office' },
  { key: 'tom', name: 'Tom Birkett', email: 'tom.birkett@harrowlane.example', role: 'technician' },
  { key: 'ada', name: 'Ada Quill', email: 'ada.quill@harrowlane.example', role: 'technician' },
] as const satisfies DemoPerson[];
