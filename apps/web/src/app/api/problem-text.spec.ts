import { HttpErrorResponse } from '@angular/common/http';
import { findIssue, toProblemSentence, toShownProblem } from './problem-text';

const refusal = (status: number, error: unknown) => new HttpErrorResponse({ status, error });

describe('toShownProblem', () => {
  it('shows the server’s words for a refusal, with the fields', () => {
    const shown = toShownProblem(
      refusal(409, {
        code: 'conflict',
        detail: 'There is already a job 2231.',
        issues: [{ field: 'number', code: 'taken', message: 'Taken.' }],
        requestId: 'r1',
      }),
    );
    expect(shown).toMatchObject({ code: 'conflict', text: 'There is already a job 2231.', requestId: 'r1' });
    expect(findIssue(shown, 'number')).toBe('Taken.');
    expect(findIssue(shown, 'title')).toBeUndefined();
  });

  it('shows our own words where the server’s would not help', () => {
    const shown = toShownProblem(refusal(500, { code: 'internal', detail: 'relation missing', issues: [] }));
    expect(shown.text).toMatch(/^Nothing was changed/);
  });

  it('knows when the server was not reached, also behind a gateway', () => {
    expect(toShownProblem(refusal(0, null)).code).toBe('offline');
    expect(toShownProblem(refusal(502, '<html>')).code).toBe('offline');
  });

  it('does not take another body for a refusal', () => {
    expect(toShownProblem(refusal(404, { code: 'made-up', issues: [] })).code).toBe('internal');
    expect(toShownProblem(new Error('bug')).title).toBe('Something went wrong on our side');
  });

  it('fits into one sentence for a short message', () => {
    expect(toProblemSentence(refusal(0, null))).toBe(
      'The server cannot be reached. Nothing was changed. Check the network, then try again.',
    );
  });
});
