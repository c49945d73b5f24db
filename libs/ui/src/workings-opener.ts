import { InjectionToken } from '@angular/core';
import { type FigureRef } from '@brakeven/contract';

/** Shows how a figure was made. */
export interface WorkingsOpener {
  open(ref: FigureRef): void;
}

/** Whoever can show workings; the web app provides it. */
export const WORKINGS_OPENER = new InjectionToken<WorkingsOpener>('WORKINGS_OPENER');
