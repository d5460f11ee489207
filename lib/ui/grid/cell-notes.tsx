import { CircleAlert, CloudOff, Eye, GitCompareArrows, History } from 'lucide-react';
import { BusyMark, Button } from '../actions/button';
import type { CellView } from './cell-view';
import type { GridCellRef, GridCellState } from './types';

type Conflict = Extract<GridCellState, { kind: 'conflict' }>;

export interface ConflictActions {
  readonly keepMine: (cell: GridCellRef, conflict: Conflict) => void;
  readonly takeTheirs: (cell: GridCellRef, conflict: Conflict) => void;
}

const LINE = 'mt-0.5 flex max-w-72 items-start gap-1 font-text text-xs leading-snug';
const ICON = 'mt-px size-3.5 flex-none';

/** What is to be said about a cell, always icon + word + reason; the cell points here with aria-describedby. */
export function CellNotes({ view, id, toTheRight = false }: { view: CellView; id: string; toTheRight?: boolean }) {
  const { state, doubts, note } = view;
  return (
    <div id={id} className={toTheRight ? 'grid justify-items-end' : undefined}>
      {state.kind === 'invalid' ? (
        <p className={`${LINE} text-iron`}>
          <CircleAlert aria-hidden="true" className={ICON} />
          <span>
            <b>not saved:</b> {state.sentence}
          </span>
        </p>
      ) : null}
      {state.kind === 'error' ? (
        <p className={`${LINE} text-iron`}>
          <CloudOff aria-hidden="true" className={ICON} />
          <span>
            <b>not saved:</b> {state.sentence}
          </span>
        </p>
      ) : null}
      {state.kind === 'conflict' ? (
        <p className={`${LINE} text-iron`}>
          <GitCompareArrows aria-hidden="true" className={ICON} />
          <span>
            <b>two values:</b> {state.theirsBy ?? 'somebody else'} wrote {state.theirs || 'an empty cell'}, you wrote{' '}
            {state.mine || 'an empty cell'}
          </span>
        </p>
      ) : null}
      {state.kind === 'saving' ? (
        // Takes no room of its own: rows must not jump under the pointer while a value is saved.
        <p className={`absolute top-1 ${toTheRight ? 'left-1' : 'right-1'} text-clay`}>
          <BusyMark />
          <span className="sr-only">saving</span>
        </p>
      ) : null}
      {doubts.map((doubt) => (
        <p key={doubt.code} className={`${LINE} ${doubt.mustMend ? 'text-iron' : 'text-ochre'}`}>
          {doubt.mustMend ? (
            <CircleAlert aria-hidden="true" className={ICON} />
          ) : (
            <Eye aria-hidden="true" className={ICON} />
          )}
          <span>
            <b>{doubt.mustMend ? 'to mend:' : 'doubtful:'}</b> {doubt.sentence}
          </span>
        </p>
      ))}
      {note ? (
        <p className={`${LINE} text-clay`}>
          <History aria-hidden="true" className={ICON} />
          <span>{note}</span>
        </p>
      ) : null}
    </div>
  );
}

export function hasNotes(view: CellView): boolean {
  return view.note !== undefined || view.doubts.length > 0 || view.state.kind !== 'saved';
}

export function ConflictChoice({
  view,
  conflict,
  actions,
  inGrid,
}: {
  view: CellView;
  conflict: Conflict;
  actions: ConflictActions;
  /** In the table the buttons are reached with Enter, not with Tab. */
  inGrid: boolean;
}) {
  const cell = { rowId: view.rowId, columnId: view.column.id };
  const tabIndex = inGrid ? -1 : 0;
  return (
    <div className={`mt-1 flex flex-wrap gap-1 ${inGrid && view.column.kind === 'number' ? 'justify-end' : ''}`}>
      <Button look="quiet" size="small" tabIndex={tabIndex} onClick={() => actions.keepMine(cell, conflict)}>
        Keep mine<span className="sr-only">, {view.name}</span>: {conflict.mine || 'empty'}
      </Button>
      <Button look="quiet" size="small" tabIndex={tabIndex} onClick={() => actions.takeTheirs(cell, conflict)}>
        Take theirs<span className="sr-only">, {view.name}</span>: {conflict.theirs || 'empty'}
      </Button>
    </div>
  );
}
