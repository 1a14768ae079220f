import { loadAsync } from 'expo-font'
import { useEffect, useState } from 'react'
import BarlowMedium from '@/assets/fonts/Barlow-Medium.woff2'
import BarlowRegular from '@/assets/fonts/Barlow-Regular.woff2'
import BarlowSemiBold from '@/assets/fonts/Barlow-SemiBold.woff2'
import BarlowCondensedMedium from '@/assets/fonts/BarlowCondensed-Medium.woff2'
import BarlowCondensedSemiBold from '@/assets/fonts/BarlowCondensed-SemiBold.woff2'
import OverpassMonoMedium from '@/assets/fonts/OverpassMono-Medium.woff2'
import OverpassMonoRegular from '@/assets/fonts/OverpassMono-Regular.woff2'

/** Past this wait a page in the system's face is better than no page. */
const LONGEST_WAIT = 1200 // ms

// Asked for as soon as the script runs, so that the first page is drawn once, in its own faces.
const loading = loadAsync({
  'Barlow-Regular': BarlowRegular,
  'Barlow-Medium': BarlowMedium,
  'Barlow-SemiBold': BarlowSemiBold,
  'BarlowCondensed-Medium': BarlowCondensedMedium,
  'BarlowCondensed-SemiBold': BarlowCondensedSemiBold,
  'OverpassMono-Regular': OverpassMonoRegular,
  'OverpassMono-Medium': OverpassMonoMedium,
})

/** Whether the page may be drawn: the shipped faces are here, failed to come, or take too long. */
export function useAppFonts(): boolean {
  const [isReady, setReady] = useState(false)
  useEffect(() => {
    const show = () => setReady(true)
    const timer = setTimeout(show, LONGEST_WAIT)
    loading.then(show, show)
    return () => clearTimeout(timer)
  }, [])
  return isReady
}
