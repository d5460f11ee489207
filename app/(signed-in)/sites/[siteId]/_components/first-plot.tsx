import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';

export function FirstPlot({ home, mayEdit }: { home: string; mayEdit: boolean }) {
  return (
    <EmptyState
      shape="plan"
      title="No plot yet"
      action={
        mayEdit ? (
          <>
            <LinkButton href={`${home}/plots/new`}>Add the first plot</LinkButton>
            <LinkButton look="quiet" href={`${home}/reports`}>
              Begin with a report
            </LinkButton>
          </>
        ) : null
      }
    >
      {mayEdit ? (
        <p>
          Press “Draw a plot” below and pull a rectangle on the ground, or add it by name and numbers. Each plot then
          takes the reports dragged onto it and shows its last pH.
        </p>
      ) : (
        <p>Somebody who owns or advises this site draws them. Each will show its area, its last test and its pH.</p>
      )}
    </EmptyState>
  );
}
