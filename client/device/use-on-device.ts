import { useEffect, useState } from 'react';
import { thisDevice } from './this-device.ts';

/**
 * What is found on this device, looked for again with everything that is kept or sent; null: not looked for yet.
 *
 * @param find stays the same function
 * @param of what it is told
 */
export function useOnDevice<Of, Found>(find: (of: Of) => Promise<Found>, of: Of): Found | null {
  const [found, setFound] = useState<Found | null>(null);
  useEffect(() => {
    let isCurrent = true;
    const look = async () => {
      const now = await find(of);
      if (isCurrent) setFound(now);
    };
    void look();
    const stop = thisDevice.subscribe(() => void look());
    return () => {
      isCurrent = false;
      stop();
    };
  }, [find, of]);
  return found;
}
