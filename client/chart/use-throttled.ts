import { useEffect, useRef, useState } from 'react';

/** The value, changed at most once in `everyMs`, and at the end always the latest. */
export function useThrottled<Value>(value: Value, everyMs: number): Value {
  const [shown, setShown] = useState(value);
  const changedAtMs = useRef(-Infinity);
  useEffect(() => {
    const waitMs = Math.max(0, changedAtMs.current + everyMs - performance.now());
    const timer = setTimeout(() => {
      changedAtMs.current = performance.now();
      setShown(value);
    }, waitMs);
    return () => clearTimeout(timer);
  }, [value, everyMs]);
  return shown;
}
