import { InjectionToken } from '@angular/core';

/** What happened and what is safe, for whatever a request threw. */
export type ProblemWords = (error: unknown) => { title: string; text: string };

/** Puts a failure into words; the web app provides its own. */
export const PROBLEM_WORDS = new InjectionToken<ProblemWords>('PROBLEM_WORDS', {
  providedIn: 'root',
  factory: () => () => ({ title: 'This could not be loaded', text: 'Nothing was changed. Try again.' }),
});
