import { useEffect, useState } from 'react';
import { AccessibilityInfo } from 'react-native';

/** Whether the person asked the system for less motion. */
export function useReducedMotion(): boolean {
  const [reduced, setReduced] = useState(false);
  useEffect(() => {
    void AccessibilityInfo.isReduceMotionEnabled().then(setReduced);
    const listening = AccessibilityInfo.addEventListener('reduceMotionChanged', setReduced);
    return () => listening.remove();
  }, []);
  return reduced;
}
