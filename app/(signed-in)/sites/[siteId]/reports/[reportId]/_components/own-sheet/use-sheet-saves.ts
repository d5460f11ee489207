import { useRef, useState } from 'react';
import type { OwnSheet, SheetMapping } from '@/lib/schemas/ownSheets';
import { callApi, type Problem } from '@/lib/ui/api';

/** What the columns hold, shown at once and saved one after the other; the last choice is the one that stands. */
export function useSheetSaves(path: string, first: OwnSheet) {
  const [sheet, setSheet] = useState(first);
  const [open, setOpen] = useState(0);
  const [problem, setProblem] = useState<Problem>();
  const queue = useRef<Promise<unknown>>(Promise.resolve());
  const newest = useRef(0);

  const send = (body: object) => {
    newest.current += 1;
    const mine = newest.current;
    setOpen((now) => now + 1);
    setProblem(undefined);
    queue.current = queue.current.then(async () => {
      const result = await callApi<OwnSheet>(`${path}/sheet`, { method: 'PUT', body });
      setOpen((now) => now - 1);
      // An answer to an older choice would put the newer one back for a moment.
      if (mine !== newest.current) return;
      if (result.ok) return setSheet(result.data);
      setProblem(result.problem);
      const truth = await callApi<OwnSheet>(`${path}/sheet`);
      if (truth.ok && mine === newest.current) setSheet(truth.data);
    });
  };

  return {
    sheet,
    busy: open > 0,
    problem,
    save: (mapping: SheetMapping) => {
      setSheet((now) => ({ ...now, mapping }));
      send({
        sheet: mapping.sheet,
        dateOrder: mapping.dateOrder,
        columns: mapping.columns.map(({ column, meaning }) => ({ column, meaning })),
      });
    },
    openSheet: (number: number, dateOrder: SheetMapping['dateOrder']) => send({ sheet: number, dateOrder }),
  };
}

export type SheetSaves = ReturnType<typeof useSheetSaves>;
