import { useWindowDimensions } from 'react-native'
import { EXTRA_WIDE, WIDE } from '@/constants/theme'

export interface Layout {
  readonly width: number
  readonly height: number
  readonly isWide: boolean
  readonly isExtraWide: boolean
}

/** Which of the three layouts the window has room for. */
export function useLayout(): Layout {
  const { width, height } = useWindowDimensions()
  return { width, height, isWide: width >= WIDE, isExtraWide: width >= EXTRA_WIDE }
}
