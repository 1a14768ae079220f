import * as Dialog from '@rn-primitives/dialog'
import type { ReactNode } from 'react'
import { Pressable, ScrollView, StyleSheet, View } from 'react-native'
import { Icon } from './Icon'
import { fonts, sizes, space, TARGET } from '@/constants/theme'
import { useLayout } from '@/hooks/useLayout'
import { useTheme } from '@/hooks/useTheme'

export interface SheetProps {
  readonly title: string
  readonly isOpen: boolean
  readonly onClose: () => void
  readonly children: ReactNode
}

/** Share of the window's height that a sheet may take: what it speaks of stays in sight. */
const TALLEST = 0.86

/** Rises from below on a phone, stands in the middle of a wide screen. Escape, the cross and a press outside close it. */
export function Sheet({ title, isOpen, onClose, children }: SheetProps) {
  const theme = useTheme()
  const { isWide, height } = useLayout()
  return (
    <Dialog.Root open={isOpen} onOpenChange={(open) => (open ? undefined : onClose())}>
      <Dialog.Portal>
        <Dialog.Overlay
          closeOnPress
          style={StyleSheet.flatten([
            styles.overlay,
            { backgroundColor: theme.scrim, justifyContent: isWide ? 'center' : 'flex-end' },
          ])}
        >
          <Dialog.Content
            aria-describedby={undefined}
            style={StyleSheet.flatten([
              styles.content,
              isWide ? styles.middle : styles.bottom,
              { maxHeight: TALLEST * height },
              { backgroundColor: theme.paper, borderColor: theme.rule },
            ])}
          >
            <View style={styles.head}>
              <Dialog.Title style={StyleSheet.flatten([styles.title, { color: theme.ink }])}>{title}</Dialog.Title>
              <Dialog.Close asChild>
                <Pressable role="button" aria-label="Close" style={styles.close}>
                  <Icon name="close" color={theme.ink} />
                </Pressable>
              </Dialog.Close>
            </View>
            <ScrollView contentContainerStyle={styles.body} keyboardShouldPersistTaps="handled">
              {children}
            </ScrollView>
          </Dialog.Content>
        </Dialog.Overlay>
      </Dialog.Portal>
    </Dialog.Root>
  )
}

const styles = StyleSheet.create({
  overlay: { position: 'absolute', top: 0, bottom: 0, left: 0, right: 0, alignItems: 'center', zIndex: 10 },
  content: { width: '100%', maxWidth: 560, borderWidth: 1 },
  bottom: { borderTopLeftRadius: 14, borderTopRightRadius: 14 },
  middle: { borderRadius: 10 },
  head: {
    flexDirection: 'row',
    alignItems: 'center',
    paddingLeft: space.lg,
    paddingRight: space.sm,
    paddingTop: space.sm,
  },
  title: { flex: 1, fontFamily: fonts.textStrong, fontSize: sizes.lead },
  close: { width: TARGET, height: TARGET, alignItems: 'center', justifyContent: 'center' },
  body: { paddingHorizontal: space.lg, paddingBottom: space.xl, paddingTop: space.xs, gap: space.lg },
})
