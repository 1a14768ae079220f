import { Page } from '@/components/ui/Page'
import { EmptyState } from '@/components/ui/states'

export default function NotFoundScreen() {
  return (
    <Page title="Nothing here">
      <EmptyState
        title="There is nothing at this address"
        text="The link may be incomplete. A design that was open in this browser is still here."
        action="To the first page"
        href="/"
      />
    </Page>
  )
}
