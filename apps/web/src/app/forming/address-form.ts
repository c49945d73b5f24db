import { DestroyRef, inject, type Signal } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { type FormControl, FormGroup } from '@angular/forms';
import { ActivatedRoute, type ParamMap, Router } from '@angular/router';
import { debounceTime, map, startWith } from 'rxjs';
import { textControl } from '../forms/text-control';
import { keepsWords } from './show-field-words';

/** What the fields of a form say, by name. */
type Texts<T> = { [K in keyof T]: string };

/** Fields that hold text, by the name that they have in the address. */
export type TextForm<T extends Texts<T>> = FormGroup<{ [K in keyof T]: FormControl<string> }>;

/** Quiet time after the last keystroke before the address follows, in ms. */
const QUIET_MS = 250;

/** A field for each text; what is wrong with it is said by `showFieldWords`. */
export function toTextForm<T extends Texts<T>>(texts: T): TextForm<T> {
  const controls = Object.entries<string>(texts).map(([name, text]) => [name, textControl(text, keepsWords)]);
  return new FormGroup(Object.fromEntries(controls)) as TextForm<T>;
}

/**
 * Keeps the fields of a form in the address, so that a result is a link that can be sent on: a field at its default is
 * left out, unless the default may be another tomorrow, as the shop's tools and bends change. Answers what the fields
 * say now. To be called while a component is made.
 */
export function keepInAddress<T extends Texts<T>>(
  form: TextForm<T>,
  defaults: T,
  passing: readonly (keyof T)[] = [],
): Signal<T> {
  const [router, route, destroyed] = [inject(Router), inject(ActivatedRoute), inject(DestroyRef)];
  const read = () => form.getRawValue() as T;
  let written = '';
  const take = (params: ParamMap) => {
    const texts = readAddress(params, defaults);
    if (toKey(texts) === written || toKey(texts) === toKey(read())) return;
    (form as FormGroup).setValue(texts);
  };
  take(route.snapshot.queryParamMap);
  const texts = toSignal(form.valueChanges.pipe(startWith(null), map(read)), { requireSync: true });
  route.queryParamMap.pipe(takeUntilDestroyed(destroyed)).subscribe(take);
  const isWhole = passing.every((name) => route.snapshot.queryParamMap.has(String(name)));
  const changes = isWhole ? form.valueChanges : form.valueChanges.pipe(startWith(null));
  const left: Partial<T> = { ...defaults };
  for (const name of passing) delete left[name];
  changes.pipe(debounceTime(QUIET_MS), takeUntilDestroyed(destroyed)).subscribe(() => {
    written = toKey(read());
    const queryParams = toQuery(read(), left);
    const extras = {
      relativeTo: route,
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    } as const;
    void router.navigate([], extras);
  });
  return texts;
}

function readAddress<T extends Texts<T>>(params: ParamMap, defaults: T): T {
  const texts = Object.entries<string>(defaults).map(([name, text]) => [name, params.get(name) ?? text]);
  return Object.fromEntries(texts) as T;
}

/** What goes into the address; null takes a name out of it, that of a text which is left out. */
function toQuery<T extends Texts<T>>(texts: T, left: Partial<T>): Record<string, string | null> {
  return Object.fromEntries(
    Object.entries<string>(texts).map(([name, text]) => [name, text === left[name as keyof T] ? null : text]),
  );
}

function toKey<T extends Texts<T>>(texts: T): string {
  return JSON.stringify(Object.entries<string>(texts).sort(([a], [b]) => a.localeCompare(b)));
}
