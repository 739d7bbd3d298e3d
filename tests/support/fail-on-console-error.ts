import { afterEach, beforeEach, expect, vi } from 'vitest';

// An error that nobody expected is a failure, wherever it was logged.
let errors: unknown[][] = [];

beforeEach(() => {
  errors = [];
  vi.spyOn(console, 'error').mockImplementation((...args) => void errors.push(args));
});

afterEach(() => {
  vi.restoreAllMocks();
  expect(errors).toEqual([]);
});
