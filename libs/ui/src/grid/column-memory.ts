import { DOCUMENT, inject, Injectable } from '@angular/core';

/** A column as its user left it. */
export interface KeptColumn {
  colId: string;
  width?: number | null;
}

/** Widths and order of grids' columns, kept in this browser. What cannot be read is as if nothing had been kept. */
@Injectable({ providedIn: 'root' })
export class ColumnMemory {
  private readonly storage = inject(DOCUMENT).defaultView?.localStorage;

  find(gridKey: string): KeptColumn[] | undefined {
    try {
      const kept: unknown = JSON.parse(this.storage?.getItem(toKey(gridKey)) ?? 'null');
      return Array.isArray(kept) && kept.every(isKeptColumn) ? kept : undefined;
    } catch {
      return undefined;
    }
  }

  keep(gridKey: string, columns: readonly KeptColumn[]): void {
    this.storage?.setItem(toKey(gridKey), JSON.stringify(columns));
  }

  forget(gridKey: string): void {
    this.storage?.removeItem(toKey(gridKey));
  }
}

function toKey(gridKey: string): string {
  return `brakeven.columns.${gridKey}`;
}

function isKeptColumn(value: unknown): value is KeptColumn {
  return typeof value === 'object' && value !== null && typeof (value as KeptColumn).colId === 'string';
}
