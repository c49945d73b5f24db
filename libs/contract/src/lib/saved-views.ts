import { z } from 'zod';
import { endpoint } from './endpoint';
import { directionSchema, idSchema, instantSchema } from './schema-values';

/** Pages that keep views of their grid. */
export const VIEW_PAGES = ['jobs'] as const;
export type ViewPage = (typeof VIEW_PAGES)[number];

const columnIdSchema = z.string().regex(/^[A-Za-z]{1,40}$/);
/** Columns in their order, the order of rows, and the filter as it stands in the page's address. */
export const viewStateSchema = z.object({
  columns: z.array(columnIdSchema).min(1, 'Show at least one column.').max(60),
  sort: columnIdSchema.nullable(),
  direction: directionSchema,
  filter: z.record(z.string().max(40), z.string().max(200)),
});
export type ViewState = z.infer<typeof viewStateSchema>;

export const savedViewSchema = z.object({
  savedViewId: idSchema,
  name: z.string(),
  /** What the page opens with; at most one of a page. */
  isDefault: z.boolean(),
  state: viewStateSchema,
  savedAt: instantSchema,
});
export type SavedView = z.infer<typeof savedViewSchema>;

export const savedViewInputSchema = z.object({
  page: z.enum(VIEW_PAGES),
  /** An own view of the same name is replaced. */
  name: z.string().trim().min(1, 'Give the view a name.').max(60, 'At most 60 characters.'),
  isDefault: z.boolean(),
  state: viewStateSchema,
});
export type SavedViewInput = z.infer<typeof savedViewInputSchema>;

export const savedViewEndpoints = {
  listSavedViews: endpoint({
    method: 'get',
    path: '/saved-views',
    summary: 'Own views of a page',
    permission: 'session.own',
    query: z.object({ page: z.enum(VIEW_PAGES) }),
    response: z.array(savedViewSchema),
  }),
  saveView: endpoint({
    method: 'post',
    path: '/saved-views',
    summary: 'Keep a view of a page under a name',
    permission: 'session.own',
    body: savedViewInputSchema,
    response: savedViewSchema,
  }),
  deleteSavedView: endpoint({
    method: 'delete',
    path: '/saved-views/:savedViewId',
    summary: 'Remove an own view',
    permission: 'session.own',
    params: z.object({ savedViewId: idSchema }),
    response: null,
  }),
};
