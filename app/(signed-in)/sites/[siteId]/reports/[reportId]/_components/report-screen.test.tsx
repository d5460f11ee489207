// @vitest-environment happy-dom
import { screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import {
  makeBlocker,
  makeOtherForm,
  makeReport,
  makeReview,
  makeReviewSample,
  makeRow,
} from '@/tests/support/review-rows';
import { gridCell, reviewServer, showReport } from '@/tests/support/review-screen';

const { held, answer } = reviewServer();
const bar = () => screen.getByTestId('confirm-bar');
const confirmButton = () => within(bar()).getByRole('button', { name: /^Confirm/ });
const problem = (code: string, detail: string, more: object = {}) => ({
  type: `urn:loamline:problem:${code}`,
  title: 'Somebody was faster',
  status: code === 'invalid' ? 422 : 409,
  code,
  detail,
  ...more,
});

describe('editing a value', () => {
  it('saves the cell with the version of its row and shows what came back', async () => {
    const saved = makeRow('ph', { printed: '6.7', value: '6.7', version: 2, state: 'edited' });
    answer('patch', '/rows/ph', 200, () => {
      held.review = { ...held.review, rows: [saved, ...held.review.rows.slice(1)] };
      return saved;
    });
    const user = showReport(held.review);
    await user.click(gridCell('Soil pH (in water), Value: 6.4'));
    await user.keyboard('6.7{Enter}');
    await waitFor(() => expect(screen.getByTestId('grid-saved').textContent).toBe('All saved.'));
    expect(held.sent).toEqual([{ method: 'patch', path: '/rows/ph', body: { version: 1, value: '6.7' } }]);
    expect(gridCell('Soil pH (in water), Value: 6.7')).toBeTruthy();
  });

  it('shows both values when somebody else wrote the cell, and sends mine on their version', async () => {
    const theirs = makeRow('ph', { printed: '6.9', value: '6.9', version: 5, state: 'edited', editedBy: 'Tom Ridge' });
    held.review = makeReview();
    answer('patch', '/rows/ph', 409, () =>
      problem('conflict', 'Changed.', { reason: 'stale-version', current: theirs }),
    );
    const user = showReport(held.review);
    held.review = { ...held.review, rows: [theirs, ...held.review.rows.slice(1)] };
    await user.click(gridCell('Soil pH (in water), Value: 6.4'));
    await user.keyboard('6.7{Enter}');
    expect(await screen.findByText(/Tom Ridge wrote 6\.9, you wrote 6\.7/)).toBeTruthy();
    expect(confirmButton().textContent).toContain('1 cell with two values');

    const mine = makeRow('ph', { printed: '6.7', value: '6.7', version: 6, state: 'edited' });
    answer('patch', '/rows/ph', 200, () => {
      held.review = { ...held.review, rows: [mine, ...held.review.rows.slice(1)] };
      return mine;
    });
    await user.click(screen.getByRole('button', { name: /^Keep mine/ }));
    await waitFor(() => expect(screen.getByTestId('grid-saved').textContent).toBe('All saved.'));
    expect(held.sent.at(-1)?.body).toEqual({ version: 5, value: '6.7' });
  });

  it('saves again by itself when the other person changed another cell of the row', async () => {
    const theirs = makeRow('ph', { method: '1:2_water', version: 4, state: 'edited', editedBy: 'Tom Ridge' });
    const both = { ...theirs, printed: '6.7', value: '6.7', version: 5 };
    let calls = 0;
    answer('patch', '/rows/ph', 409, () => {
      calls += 1;
      answer('patch', '/rows/ph', 200, () => {
        held.review = { ...held.review, rows: [both, ...held.review.rows.slice(1)] };
        return both;
      });
      return problem('conflict', 'Changed.', { reason: 'stale-version', current: theirs });
    });
    const user = showReport(held.review);
    await user.click(gridCell('Soil pH (in water), Value: 6.4'));
    await user.keyboard('6.7{Enter}');
    await waitFor(() => expect(held.sent).toHaveLength(2));
    expect(calls).toBe(1);
    expect(held.sent.at(-1)?.body).toEqual({ version: 4, value: '6.7' });
    await waitFor(() => expect(screen.getByTestId('grid-saved').textContent).toBe('All saved.'));
  });

  it('keeps an impossible value on screen with the sentence, and Confirm waits for it', async () => {
    const sentence = 'The pH scale ends at 14, so 73 is no pH. Is a decimal point missing?';
    answer('patch', '/rows/ph', 422, () => problem('invalid', sentence, { fields: { value: sentence } }));
    const user = showReport(held.review);
    await user.click(gridCell('Soil pH (in water), Value: 6.4'));
    await user.keyboard('73{Enter}');
    expect(await screen.findByText(sentence)).toBeTruthy();
    expect(gridCell('Soil pH (in water), Value: 73').getAttribute('aria-invalid')).toBe('true');
    expect(confirmButton().getAttribute('aria-disabled')).toBe('true');
    expect(confirmButton().textContent).toContain('1 typed value refused');
  });
});

describe('doubt', () => {
  it('puts the doubtful row first and ends the doubt on "It is right"', async () => {
    const doubt = { code: 'two-readings', sentence: 'Two readings differ: 41 and 47.' };
    const [ph, p] = held.review.rows;
    if (!ph || !p) throw new Error('Two rows were expected.');
    held.review = { ...held.review, rows: [ph, { ...p, doubts: [doubt], doubtful: true }] };
    answer('post', '/rows/p/accept', 200, () => {
      const right = { ...p, version: 2 };
      held.review = { ...held.review, rows: [ph, right] };
      return right;
    });
    const user = showReport(held.review);
    const headers = screen.getAllByRole('rowheader').map((one) => one.getAttribute('aria-label'));
    expect(headers).toEqual(['Analyte: Phosphorus', 'Analyte: Soil pH (in water)']);
    await user.keyboard('{Alt>}n{/Alt}');
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Phosphorus, Value: 41');
    await user.keyboard('{Control>}{Enter}{/Control}');
    await waitFor(() => expect(screen.getByRole('button', { name: /Next doubtful \(0\)/ })).toBeTruthy());
    expect(held.sent.at(-1)).toEqual({ method: 'post', path: '/rows/p/accept', body: { version: 1 } });
    // The row stays where it was: the list does not jump under the hands.
    expect(screen.getAllByRole('rowheader')[0]?.getAttribute('aria-label')).toBe('Analyte: Phosphorus');
  });

  it('does not offer "It is right" for what cannot be', async () => {
    const [ph, p] = held.review.rows;
    if (!ph || !p) throw new Error('Two rows were expected.');
    held.review = { ...held.review, rows: [{ ...ph, printed: '73', impossible: 'No pH.', doubtful: true }, p] };
    const user = showReport(held.review);
    await user.keyboard('{Alt>}n{/Alt}');
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Soil pH (in water), Value: 73');
    expect(screen.queryByRole('button', { name: /It is right/ })).toBeNull();
  });
});

describe('confirming', () => {
  it('says what is missing in words and leads there', async () => {
    const bare = makeReviewSample('sample-1', { plotId: null });
    held.review = makeReview({
      samples: [bare],
      blockers: [makeBlocker('no-plot'), makeBlocker('impossible', { rowId: 'p' })],
    });
    const user = showReport(held.review);
    expect(confirmButton().textContent).toContain('still missing: 1 sample without a plot, 1 value to mend');
    await user.click(within(bar()).getByRole('button', { name: '1 sample without a plot' }));
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Plot of Top bed');
    await user.click(within(bar()).getByRole('button', { name: '1 value to mend' }));
    await waitFor(() => expect(document.activeElement?.getAttribute('aria-label')).toBe('Phosphorus, Value: 41'));
  });

  it('confirms, says how many, and shows the report as confirmed', async () => {
    answer('post', '/confirm', 200, () => {
      const report = makeReport({
        state: 'confirmed',
        version: 2,
        confirmedBy: { id: 'person-2', name: 'Tom Ridge' },
        confirmedAt: '2026-12-01T09:00:00.000Z',
      });
      held.review = { ...held.review, report };
      return { reportId: 'report-1', state: 'confirmed', results: 2, plotIds: ['plot-1'] };
    });
    const user = showReport(held.review);
    await user.click(within(bar()).getByRole('button', { name: 'Confirm 2 values' }));
    expect(await screen.findByText('Confirmed by Tom Ridge, 1 Dec 2026')).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Top bed' }).getAttribute('href')).toBe('/sites/site-1/plots/plot-1');
    expect(screen.queryByTestId('confirm-bar')).toBeNull();
    expect(screen.getByRole('button', { name: 'Withdraw' })).toBeTruthy();
    expect(screen.getByRole('grid').getAttribute('aria-readonly')).toBe('true');
  });

  it('tells the one who came second who was first', async () => {
    const detail = 'This report is already confirmed by Ida Marrow.';
    answer('post', '/confirm', 409, () => problem('conflict', detail, { reason: 'report-confirmed' }));
    const user = showReport(held.review);
    await user.click(within(bar()).getByRole('button', { name: 'Confirm 2 values' }));
    const notice = await screen.findByTestId('faster');
    expect(notice.textContent).toContain(detail);
    expect(document.activeElement).toBe(notice);

    const report = makeReport({ state: 'confirmed', version: 2, confirmedBy: { id: 'person-1', name: 'Ida Marrow' } });
    held.review = { ...held.review, report };
    await user.click(within(notice).getByRole('button', { name: 'Show it as it stands now' }));
    expect(await screen.findByText('Confirmed by Ida Marrow')).toBeTruthy();
    expect(screen.queryByTestId('faster')).toBeNull();
  });

  it('sends the samples that were said to be a second analysis', async () => {
    const sample = makeReviewSample('sample-1', { candidates: [makeOtherForm()] });
    held.review = makeReview({ samples: [sample], blockers: [makeBlocker('same-analysis')] });
    answer('post', '/confirm', 200, () => ({ reportId: 'report-1', state: 'confirmed', results: 2, plotIds: [] }));
    const user = showReport(held.review);
    expect(screen.getByText(/12 of 13 shared values are equal/)).toBeTruthy();
    expect(confirmButton().textContent).toContain('1 sample that may count twice');
    await user.click(screen.getByRole('button', { name: /A second analysis of the same bag/ }));
    await user.click(within(bar()).getByRole('button', { name: 'Confirm 2 values' }));
    await waitFor(() => expect(held.sent.at(-1)?.body).toEqual({ separateAnalyses: ['sample-1'] }));
  });
});

describe('samples', () => {
  it("saves a plot with the sample's version and shows the choice at once", async () => {
    const saved = makeReviewSample('sample-1', { plotId: 'plot-2', version: 2 });
    answer('patch', '/samples/sample-1', 200, () => {
      held.review = { ...held.review, samples: [saved] };
      return saved;
    });
    const user = showReport(held.review);
    await user.selectOptions(screen.getByRole('combobox', { name: 'Plot of Top bed' }), 'Long border');
    expect(screen.getByRole('combobox', { name: 'Plot of Top bed' })).toHaveProperty('value', 'plot-2');
    await waitFor(() => expect(held.sent.at(-1)?.body).toEqual({ version: 1, plotId: 'plot-2' }));
  });

  it('saves both ends of a depth together, in centimetres', async () => {
    const saved = makeReviewSample('sample-1', { depthFromCm: '15.24', depthToCm: '30.48', version: 2 });
    answer('patch', '/samples/sample-1', 200, () => {
      held.review = { ...held.review, samples: [saved] };
      return saved;
    });
    const user = showReport(held.review);
    const from = screen.getByRole('textbox', { name: /^Depth from/ });
    await user.clear(from);
    await user.type(from, '6');
    await user.tab();
    const to = screen.getByRole('textbox', { name: /^Depth to/ });
    await user.clear(to);
    await user.type(to, '12');
    await user.tab();
    await waitFor(() => expect(held.sent).toHaveLength(1));
    expect(held.sent[0]?.body).toEqual({ version: 1, depthFromCm: 15.24, depthToCm: 30.48 });
  });
});

describe('roles and states', () => {
  it('a helper mends and is told who confirms', () => {
    showReport(held.review, 'helper');
    expect(bar().textContent).toContain('An owner or adviser confirms.');
    expect(within(bar()).queryByRole('button', { name: /^Confirm/ })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Set aside' })).toBeNull();
    expect(screen.getByRole('grid').getAttribute('aria-readonly')).toBe('false');
  });

  it('a helper cannot withdraw', () => {
    held.review = makeReview({ report: makeReport({ state: 'confirmed' }) });
    showReport(held.review, 'helper');
    expect(screen.queryByRole('button', { name: 'Withdraw' })).toBeNull();
  });

  it('a report that was not read offers typing it in; reading again only to those who decide', () => {
    const refusal = { code: 'picture-only', sentence: 'This is a picture of a page.' };
    const report = makeReport({ state: 'unreadable', refusal });
    held.review = makeReview({ report });
    showReport(held.review, 'helper');
    expect(screen.getByText('This is a picture of a page.')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Type it in beside the page' })).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Read it again' })).toBeNull();
  });

  it('says how far the reading is, and when it takes too long', () => {
    held.review = makeReview({ report: makeReport({ state: 'reading', pages: 6, pagesRead: 2 }) });
    showReport(held.review);
    expect(screen.getByRole('progressbar').getAttribute('aria-valuetext')).toBe('page 2 of 6');
  });
});
