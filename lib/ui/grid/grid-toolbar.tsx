'use client';

import { ArrowDownToLine, Eye, Plus, Redo2, Trash2, Undo2 } from 'lucide-react';
import { Button } from '../actions/button';
import type { GridCounts } from './types';

export interface GridToolbarProps {
  /** On a narrow screen the buttons of rows stand with the rows, so that the bar keeps to one line. */
  readonly compact: boolean;
  readonly doubtful: number;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly readOnly: boolean;
  readonly selectedRows: number;
  readonly onNextDoubtful: () => void;
  readonly onUndo: () => void;
  readonly onRedo: () => void;
  /** Left out in the card form, where there is no selection to fill. */
  readonly onFillDown?: (() => void) | undefined;
  readonly onAddRow?: (() => void) | undefined;
  readonly onRemoveRows?: (() => void) | undefined;
}

export function GridToolbar(props: GridToolbarProps) {
  const { doubtful, readOnly } = props;
  return (
    <fieldset className="flex min-w-0 flex-wrap items-center gap-2">
      <legend className="sr-only">Grid tools</legend>
      <Button
        look={doubtful > 0 ? 'primary' : 'quiet'}
        size="small"
        icon={<Eye aria-hidden="true" className="size-4" />}
        onClick={props.onNextDoubtful}
        unavailable={doubtful === 0 && 'no doubtful value left'}
        aria-keyshortcuts="Alt+N"
      >
        Next doubtful ({doubtful})
      </Button>
      {readOnly ? null : (
        <>
          <Button
            look="quiet"
            size="small"
            icon={<Undo2 aria-hidden="true" className="size-4" />}
            className="gap-0!"
            onClick={props.onUndo}
            unavailable={!props.canUndo && 'nothing to undo'}
            aria-keyshortcuts="Control+Z"
          >
            <span className="sr-only">Undo</span>
          </Button>
          <Button
            look="quiet"
            size="small"
            icon={<Redo2 aria-hidden="true" className="size-4" />}
            className="gap-0!"
            onClick={props.onRedo}
            unavailable={!props.canRedo && 'nothing to redo'}
            aria-keyshortcuts="Control+Y"
          >
            <span className="sr-only">Redo</span>
          </Button>
          {props.onFillDown ? (
            <Button
              look="quiet"
              size="small"
              icon={<ArrowDownToLine aria-hidden="true" className="size-4" />}
              onClick={props.onFillDown}
              aria-keyshortcuts="Control+D"
            >
              Fill down
            </Button>
          ) : null}
          {props.onAddRow && !props.compact ? (
            <Button
              look="quiet"
              size="small"
              icon={<Plus aria-hidden="true" className="size-4" />}
              onClick={props.onAddRow}
            >
              Add row
            </Button>
          ) : null}
          {props.onRemoveRows ? (
            <Button
              look="quiet"
              size="small"
              icon={<Trash2 aria-hidden="true" className="size-4" />}
              onClick={props.onRemoveRows}
            >
              {props.selectedRows > 1 ? `Remove ${props.selectedRows} rows` : 'Remove row'}
            </Button>
          ) : null}
        </>
      )}
    </fieldset>
  );
}

/** How much of it is saved; beside the line of the active cell, so that no row moves when the sentence grows. */
export function SavedLine({ counts, onRetry }: { counts: GridCounts; onRetry: () => void }) {
  return (
    <p className="ml-auto min-h-9 content-center text-sm text-clay" data-testid="grid-saved">
      {stateSentence(counts)}
      {counts.failed > 0 ? (
        <Button look="plain" size="small" onClick={onRetry}>
          Try again
        </Button>
      ) : null}
    </p>
  );
}

function stateSentence(counts: GridCounts): string {
  const parts = [
    counts.failed > 0 && `${counts.failed} not saved, the text is kept`,
    counts.invalid > 0 && `${counts.invalid} to mend before saving`,
    counts.conflicts > 0 && `${counts.conflicts} with two values`,
    counts.saving > 0 && `saving ${counts.saving}`,
  ].filter((part) => part !== false);
  return parts.length > 0 ? `${parts.join(', ')}.` : 'All saved.';
}
