import type { Page } from '@playwright/test';
import type { DemoKey } from './watched-test.ts';

/** A screen of the application, how one gets there, and the words by which it is known to stand. */
export type Screen = {
  name: string;
  person: DemoKey | null;
  open: (page: Page) => Promise<void>;
  standing: RegExp;
  /** A site screen, used with one hand: every target is 48 px or more. */
  isSite?: boolean;
};

type Ids = {
  job: string;
  home: string;
  machine: string;
  visit: string;
  stopRun: string;
  rating: string;
};

/** What the demo shop calls its things this time. */
async function idsOf(page: Page): Promise<Ids> {
  const fetchJson = async (path: string) => (await page.request.get(path)).json();
  const jobs: { id: string; machine: { id: string }; home: { id: string }; complaint: string }[] =
    await fetchJson('/api/jobs');
  const job = jobs.find(({ complaint }) => complaint.startsWith('Too hot to touch'));
  if (!job) throw new Error('the demo shop has no runaway');
  const { visits }: { visits: { id: string; runs: { id: string; outcome: string }[] }[] } =
    await fetchJson(`/api/jobs/${job.id}`);
  const stopRun = visits.flatMap(({ runs }) => runs).find(({ outcome }) => outcome === 'stop');
  const ratings: { id: string }[] = await fetchJson('/api/ratings');
  return {
    job: job.id,
    home: job.home.id,
    machine: job.machine.id,
    visit: visits[0]?.id ?? '',
    stopRun: stopRun?.id ?? '',
    rating: ratings[0]?.id ?? '',
  };
}

function at(path: string | ((ids: Ids) => string)): Screen['open'] {
  return async (page) => {
    await page.goto(typeof path === 'string' ? path : path(await idsOf(page)));
  };
}

async function openUpload(page: Page): Promise<void> {
  await page.goto(`/visits/${(await idsOf(page)).visit}/upload`);
}

async function openPreview(page: Page): Promise<void> {
  await openUpload(page);
  await page.getByLabel('Probe file').setInputFiles('sample-logs/mixed-one-outside.csv');
  await page.getByRole('button', { name: 'Accept and judge' }).click();
}

async function openRefusal(page: Page): Promise<void> {
  await openUpload(page);
  const picture = Buffer.from('%PDF-1.7 not a log');
  await page
    .getByLabel('Probe file')
    .setInputFiles({ name: 'log.csv', mimeType: 'text/csv', buffer: picture });
}

async function openQuestion(page: Page): Promise<void> {
  await openUpload(page);
  const rows = Array.from({ length: 40 }, (_, i) => `${i * 5},${(21 + i * 1.1).toFixed(1)}`);
  const log = Buffer.from(['Seconds,Outlet', ...rows].join('\n'));
  await page
    .getByLabel('Probe file')
    .setInputFiles({ name: 'log.csv', mimeType: 'text/csv', buffer: log });
}

async function openShared(page: Page): Promise<void> {
  const { stopRun } = await idsOf(page);
  const made = await page.request.post(`/api/runs/${stopRun}/shares`, { data: { days: 2 } });
  const { url }: { url: string } = await made.json();
  await page.goto(new URL(url).pathname + new URL(url).hash);
}

export const SCREENS: Screen[] = [
  { name: 'sign-in', person: null, open: at('/sign-in'), standing: /Customers need no account/ },
  { name: 'closed link', person: null, open: at('/shared#none'), standing: /does not open/ },
  { name: 'customer’s page', person: 'nora', open: openShared, standing: /May you use it tonight/ },
  { name: 'rounds', person: 'tom', open: at('/rounds'), standing: /Rosalind Peake/, isSite: true },
  {
    name: 'empty day',
    person: 'tom',
    open: at('/rounds?day=2031-02-02'),
    standing: /No visit on this day/,
    isSite: true,
  },
  {
    name: 'rounds of the office',
    person: 'imelda',
    open: at('/rounds'),
    standing: /Ada Quill/,
    isSite: true,
  },
  {
    name: 'visit',
    person: 'tom',
    open: at(({ visit }) => `/visits/${visit}`),
    standing: /Getting in|Specified, high heat/,
    isSite: true,
  },
  {
    name: 'upload',
    person: 'tom',
    open: openUpload,
    standing: /as the probe wrote it/,
    isSite: true,
  },
  {
    name: 'look over a file, with faults',
    person: 'tom',
    open: openPreview,
    standing: /Four things to put right/,
    isSite: true,
  },
  {
    name: 'refused file',
    person: 'tom',
    open: openRefusal,
    standing: /was not read/,
    isSite: true,
  },
  { name: 'question', person: 'tom', open: openQuestion, standing: /Which unit/, isSite: true },
  {
    name: 'run',
    person: 'tom',
    open: at(({ stopRun }) => `/runs/${stopRun}`),
    standing: /In the next ten minutes/,
  },
  { name: 'jobs', person: 'nora', open: at('/jobs'), standing: /open jobs?/ },
  {
    name: 'job',
    person: 'nora',
    open: at(({ job }) => `/jobs/${job}`),
    standing: /Visits and runs/,
  },
  { name: 'take a call', person: 'nora', open: at('/jobs/new'), standing: /Find by name, phone/ },
  {
    name: 'book a visit',
    person: 'nora',
    open: at(({ job }) => `/jobs/${job}/visits/new`),
    standing: /what to know/i,
  },
  { name: 'homes', person: 'nora', open: at('/homes'), standing: /homes/ },
  { name: 'home', person: 'nora', open: at(({ home }) => `/homes/${home}`), standing: /Machines/ },
  {
    name: 'new machine',
    person: 'nora',
    open: at(({ home }) => `/homes/${home}/machines/new`),
    standing: /As its plate says/,
  },
  {
    name: 'machine',
    person: 'nora',
    open: at(({ machine }) => `/machines/${machine}`),
    standing: /Specified to have/,
  },
  {
    name: 'fit a part',
    person: 'nora',
    open: at(({ machine }) => `/machines/${machine}/parts/new`),
    standing: /Lot/,
  },
  {
    name: 'specify',
    person: 'nora',
    open: at(({ machine }) => `/machines/${machine}/specified/high`),
    standing: /High limit: the safety/,
  },
  { name: 'ratings', person: 'nora', open: at('/ratings'), standing: /Add a probe/ },
  {
    name: 'change a rating',
    person: 'nora',
    open: at(({ rating }) => `/ratings/${rating}`),
    standing: /where the heat should stop/,
  },
  {
    name: 'new probe',
    person: 'nora',
    open: at('/probes/new'),
    standing: /Response time in moving air/,
  },
  { name: 'shop', person: 'nora', open: at('/shop'), standing: /may sign in/ },
  {
    name: 'add a person',
    person: 'nora',
    open: at('/shop/people/new'),
    standing: /First password/,
  },
  { name: 'account', person: 'tom', open: at('/account'), standing: /assword/ },
  { name: 'more', person: 'tom', open: at('/more'), standing: /Ratings/ },
  { name: 'on this phone', person: 'tom', open: at('/unsent'), standing: /Everything is with/ },
  { name: 'nothing here', person: 'tom', open: at('/nowhere'), standing: /nothing|no page/i },
];
