import {
  CellApiModule,
  CellStyleModule,
  ClientSideRowModelModule,
  ColumnApiModule,
  ColumnAutoSizeModule,
  InfiniteRowModelModule,
  PinnedRowModule,
  RowApiModule,
  RowStyleModule,
  ScrollApiModule,
} from 'ag-grid-community';

/** Only what the grid uses: each module weighs. */
export const GRID_MODULES = [
  CellApiModule,
  CellStyleModule,
  ClientSideRowModelModule,
  ColumnApiModule,
  ColumnAutoSizeModule,
  InfiniteRowModelModule,
  PinnedRowModule,
  RowApiModule,
  RowStyleModule,
  ScrollApiModule,
];
