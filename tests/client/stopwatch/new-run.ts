/** How a run begins, before anything is said of it. */
export const NEW_RUN = {
  visitId: 'v',
  label: 'Run 1',
  unit: 'F',
  hasTenths: false,
  setup: { placement: '', duct: null, load: null, setting: 'high', roomTemp: null, probeId: null },
} as const;
