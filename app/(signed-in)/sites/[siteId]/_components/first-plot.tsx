import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';

/** For who may draw; to others the plan itself says what will stand there. */
export function FirstPlot({ home }: { home: string }) {
  return (
    <EmptyState
      shape="plan"
      title="No plot yet"
      action={
        <>
          <LinkButton href={`${home}/plots/new`}>Add the first plot</LinkButton>
          <LinkButton look="quiet" href={`${home}/reports`}>
            Begin with a report
          </LinkButton>
        </>
      }
    >
      Press “Draw a plot” below and pull a rectangle on the ground, or add it by name and numbers. Each plot then takes
      the reports dragged onto it and shows its last pH.
    </EmptyState>
  );
}
