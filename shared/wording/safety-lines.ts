/** The line that stands on every page with findings. */
export const SAFETY_LINE =
  'Findings are evidence for a trained person, not a licence to bypass a limit. Local codes and the maker’s service sheet come first.';

/** Cautions before a run, in short imperative lines. */
export const RUN_CAUTIONS = [
  'Stay with the machine. Never leave it heating past its limit.',
  'Know where the plug, the breaker and the gas shut-off are before you start.',
  'If the exhaust still climbs after heat off: pull the plug or open the breaker.',
  'Gas: on a smell, shut it off, air the room, touch no switch.',
  'Keep the probe lead clear of the drum, the belt and hot parts.',
  'Lint burns. Clear it before the run.',
] as const;

/** Cautions before any electrical check. */
export const CHECK_CAUTIONS = [
  'Disconnect and lock out before you touch a terminal. Prove it dead.',
  'Live measurement only by a qualified person, with a rated meter and gloves.',
  'Sheet metal is sharp. The heater stays hot.',
  'Put every ground wire back, and every guard, before you close up.',
  'Local codes and the maker’s service sheet come first.',
] as const;
