import type { PointerEvent, ViewStyle } from 'react-native'

/** Keeps a drag going when the pointer leaves what it began on. */
export function capturePointer(event: PointerEvent): void {
  const { target } = event as unknown as { target: Partial<Element> }
  target.setPointerCapture?.(event.nativeEvent.pointerId)
}

/** The drag runs sideways; up and down the finger still scrolls the page. The property exists on the web alone. */
export const dragSideways = { touchAction: 'pan-y', cursor: 'ew-resize', userSelect: 'none' } as unknown as ViewStyle
export const readSideways = { touchAction: 'pan-y', cursor: 'crosshair', userSelect: 'none' } as unknown as ViewStyle
