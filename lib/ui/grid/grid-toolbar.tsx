'use client';

import { ArrowDownToLine, Eye, Plus, Redo2, Trash2, Undo2 } from 'lucide-react';
import { Button } from '../actions/button';

export interface GridToolbarProps {
  /** On a narrow screen undo and redo show their sign alone, so that the bar keeps to one line. */
  readonly compact: boolean;
  readonly doubtful: number;
  readonly counts: {
    readonly saving: number;
    readonly failed: number;
    readonly conflicts: number;
    readonly invalid: number;
  };
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
  readonly onRetry: () => void;
}

export function GridToolbar(props: GridToolbarProps) {
  const { doubtful, counts, readOnly } = props;
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
            className={props.compact ? 'gap-0!' : ''}
            onClick={props.onUndo}
            unavailable={!props.canUndo && 'nothing to undo'}
            aria-keyshortcuts="Control+Z"
          >
            <span className={props.compact ? 'sr-only' : ''}>Undo</span>
          </Button>
          <Button
            look="quiet"
            size="small"
            icon={<Redo2 aria-hidden="true" className="size-4" />}
            className={props.compact ? 'gap-0!' : ''}
            onClick={props.onRedo}
            unavailable={!props.canRedo && 'nothing to redo'}
            aria-keyshortcuts="Control+Y"
          >
            <span className={props.compact ? 'sr-only' : ''}>Redo</span>
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
      {/* A line of its own: the rows under it must not move when the sentence or a button grows. */}
      <p className="min-h-9 basis-full content-center text-sm text-clay" data-testid="grid-saved">
        {stateSentence(counts)}
        {counts.failed > 0 ? (
          <Button look="plain" size="small" onClick={props.onRetry}>
            Try again
          </Button>
        ) : null}
      </p>
    </fieldset>
  );
}

function stateSentence(counts: GridToolbarProps['counts']): string {
  const parts = [
    counts.failed > 0 && `${counts.failed} not saved, the text is kept`,
    counts.invalid > 0 && `${counts.invalid} to mend before saving`,
    counts.conflicts > 0 && `${counts.conflicts} with two values`,
    counts.saving > 0 && `saving ${counts.saving}`,
  ].filter((part) => part !== false);
  return parts.length > 0 ? `${parts.join(', ')}.` : 'All saved.';
}
