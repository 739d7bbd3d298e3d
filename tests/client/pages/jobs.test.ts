import { expect, test } from 'vitest';
import { askedFilter, isNarrowed, isShown } from '#client/pages/jobs/job-filter.ts';
import { placesFor } from '#client/pages/frame/places-for.ts';
import { placeOf } from '#client/components/frame.tsx';

const NONE = { find: '', state: '', technician: '', callbacks: '' };

test('every job but the closed ones is shown until a state is chosen', () => {
  expect(isShown({ state: 'booked' }, NONE)).toBe(true);
  expect(isShown({ state: 'fixed' }, NONE)).toBe(true);
  expect(isShown({ state: 'closed' }, NONE)).toBe(false);
  expect(isShown({ state: 'closed' }, { ...NONE, state: 'all' })).toBe(true);
});

test('the server is asked for no state where every job is wanted', () => {
  expect(askedFilter({ ...NONE, state: 'all' }).state).toBe('');
  expect(askedFilter({ ...NONE, state: 'on-site' }).state).toBe('on-site');
});

test('a filter that says nothing narrows nothing', () => {
  expect(isNarrowed(NONE)).toBe(false);
  expect(isNarrowed({ ...NONE, callbacks: 'yes' })).toBe(true);
});

test('the head of the desk names the Shop to its owner alone', () => {
  const namesFor = (role: 'owner' | 'office' | 'technician') =>
    placesFor(role).map(({ name }) => name);

  expect(namesFor('owner')).toEqual(['Rounds', 'Jobs', 'Homes', 'Ratings', 'Shop']);
  expect(namesFor('office')).toEqual(['Rounds', 'Jobs', 'Homes', 'Ratings']);
  expect(namesFor('technician')).toEqual(['Rounds', 'Jobs', 'Homes', 'Ratings']);
});

test('a machine belongs to Homes, a run to Jobs, and an account to no place of the desk', () => {
  const places = placesFor('owner');
  const nameAt = (address: string) => placeOf(address, places)?.name;

  expect(nameAt('/machines/7')).toBe('Homes');
  expect(nameAt('/runs/7')).toBe('Jobs');
  expect(nameAt('/jobs')).toBe('Jobs');
  expect(nameAt('/account')).toBeUndefined();
  expect(nameAt('/jobsworth')).toBeUndefined();
});
