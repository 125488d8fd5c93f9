import { useEffect, useState } from 'react';
import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import { substanceOf } from '../worker/evaluateSheet.ts';

/** A substance made ready on the page itself, for answers under the pointer; null while it loads. */
export function useMedium(id: string): Medium | null {
  const [ready, setReady] = useState<Medium | null>(null);
  useEffect(() => {
    let wanted = true;
    void substanceOf(id).then((substance) => {
      if (wanted && substance) setReady(medium(substance));
    });
    return () => {
      wanted = false;
    };
  }, [id]);
  return ready?.substance.id === id ? ready : null;
}
