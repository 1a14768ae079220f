import { useEffect, useState } from 'react'
import { AccessibilityInfo } from 'react-native'

/** Whether the system asks for stillness. */
export function useReducedMotion(): boolean {
  const [isStill, setStill] = useState(false)
  useEffect(() => {
    let isCurrent = true
    void AccessibilityInfo.isReduceMotionEnabled().then((value) => isCurrent && setStill(value))
    const subscription = AccessibilityInfo.addEventListener('reduceMotionChanged', setStill)
    return () => {
      isCurrent = false
      subscription.remove()
    }
  }, [])
  return isStill
}
