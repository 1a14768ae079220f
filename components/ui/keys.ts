import type { ViewProps } from 'react-native'

interface KeyEvent {
  readonly nativeEvent: { readonly key: string }
  preventDefault(): void
}

/** Key presses for a view that has the focus; React Native's types lack them. `handle` says whether it used the key. */
export function onKey(handle: (key: string) => boolean): ViewProps {
  const onKeyDown = (event: KeyEvent) => {
    if (handle(event.nativeEvent.key)) event.preventDefault()
  }
  return { onKeyDown } as ViewProps
}
