import { useColorScheme } from 'react-native'
import { dark, light, type Palette } from '@/constants/theme'

/** The palette that the system setting asks for. */
export function useTheme(): Palette {
  return useColorScheme() === 'dark' ? dark : light
}
