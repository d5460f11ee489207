import { and, eq, isNull, sql } from 'drizzle-orm';
import { readingRow, result } from '@/db/schema';
import { notFound, Problem } from '@/lib/errors';
import { correctResultInput, type Result } from '@/lib/schemas/results';
import { readValueText, VALUE_TEXT_REASONS } from '@/lib/schemas/valueText';
import { editColumns } from '../review/applyEdit';
import { milligramsPerKilogram } from '../review/unitBasis';
import { impossibleSentence, oddDoubts } from '../review/valueRules';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { loadResults } from './loadResults';

const refused = (sentence: string) => new Problem('invalid', sentence, { fields: { value: sentence } });

/** A confirmed number never changes: a correction stands beside it and supersedes it, with who, when and why. */
export const correctResult = siteVerb({
  act: 'reading.decide',
  input: correctResultInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<Result> => {
    const typed = readValueText(input.value);
    if (!typed.ok) throw refused(VALUE_TEXT_REASONS[typed.reason]);
    const [old] = await tx
      .update(result)
      .set({ supersededAt: ctx.now, supersededReason: input.reason })
      .where(and(eq(result.siteId, siteId), eq(result.id, input.resultId), isNull(result.supersededAt)))
      .returning();
    if (!old) {
      const [there] = await tx
        .select({ id: result.id })
        .from(result)
        .where(and(eq(result.siteId, siteId), eq(result.id, input.resultId)));
      if (!there) throw notFound();
      throw new Problem(
        'conflict',
        'This result was corrected or withdrawn by somebody else. Look at the new one first.',
        {
          reason: 'superseded',
        },
      );
    }
    const { printed, value, qualifier } = typed;
    const facts = {
      analyte: old.analyte,
      unit: old.unit,
      method: old.method,
      form: old.form,
      printed,
      value,
      qualifier,
    };
    const impossible = impossibleSentence(facts);
    if (impossible) throw refused(impossible);
    const { id: _, supersededAt: __, supersededReason: ___, ...same } = old;
    const [made] = await tx
      .insert(result)
      .values({
        ...same,
        printed,
        value,
        qualifier,
        valueSi: milligramsPerKilogram(value, old.unit),
        confirmedBy: person.id,
        confirmedAt: ctx.now,
        supersedesId: old.id,
      })
      .returning({ id: result.id });
    if (!made) throw new Error('The correction was not written.');
    if (old.readingRowId) await carryIntoReview(old.readingRowId);
    await audit({
      act: 'result.correct',
      objectKind: 'result',
      objectId: made.id,
      detail: { supersedes: old.id, from: old.printed, to: printed, reason: input.reason },
    });
    await enqueue(tx, 'recheck-effects', { siteId, id: old.plotId });
    const [now] = await loadResults(tx, siteId, eq(result.id, made.id));
    if (!now) throw new Error('The correction was not written.');
    return now;

    /** Otherwise a withdrawal and a second confirmation would bring the old number back. */
    async function carryIntoReview(rowId: string): Promise<void> {
      const here = and(eq(readingRow.siteId, siteId), eq(readingRow.id, rowId));
      const [row] = await tx.select().from(readingRow).where(here);
      if (!row) return;
      const columns = editColumns(row, { ok: true, facts, doubts: oddDoubts(facts) }, person.id, ctx.now);
      await tx
        .update(readingRow)
        .set({ ...columns, version: sql`${readingRow.version} + 1` })
        .where(here);
    }
  },
});
