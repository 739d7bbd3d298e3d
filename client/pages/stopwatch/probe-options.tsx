import type { StoredProbe } from '#shared/schemas/ratings.ts';

/** Heat settings as keys. */
export const HEATS = [
  { value: 'high', words: 'High' },
  { value: 'medium', words: 'Medium' },
  { value: 'low', words: 'Low' },
] as const;

/** The shop's probes to choose from. */
export function ProbeOptions({ probes }: { probes: StoredProbe[] }) {
  return (
    <>
      <option value="">Not one of the list</option>
      {probes.map(({ id, name, accuracy, unit }) => (
        <option key={id} value={id}>
          {name}, ±{accuracy} °{unit}
        </option>
      ))}
    </>
  );
}
