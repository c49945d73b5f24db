import { ApplicationRef } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { of } from 'rxjs';
import { FormingApi } from '../../api/forming-api';
import { provideSession } from '../../testing/fake-session';
import { render, type Rendered } from '../../testing/rendered';
import { sampleReference } from '../../testing/sample-reference';
import { FormingStore } from '../forming-store';
import { FitPage } from './fit-page';

describe('FitPage', () => {
  let page: Rendered<FitPage>;

  const open = async (url = '/', reference = sampleReference()) => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([{ path: '**', children: [] }]),
        provideSession('operator'),
        FormingStore,
        { provide: FormingApi, useValue: { getReference: () => of(reference) } },
      ],
    });
    await TestBed.inject(Router).navigateByUrl(url);
    const store = TestBed.inject(FormingStore);
    TestBed.tick();
    await TestBed.inject(ApplicationRef).whenStable();
    expect(store.reference.hasValue()).toBe(true);
    page = await render(FitPage);
  };
  const rows = () => page.textsOf('tbody tr').filter((text) => /rating|flange|radius|in\b/.test(text));

  it('puts the verdict first and marks the opening to use', async () => {
    await open();
    expect(page.textsOf('#verdict-heading')[0]).toMatch(
      /^It fits: use the 1\.25 in opening, [\d.]+–[\d.]+ US tons/,
    );
    expect(page.textsOf('tr.best')[0]).toContain('use this one');
  });

  it('judges each opening that the press owns, narrowest first', async () => {
    await open();
    expect(page.textsOf('.pick')).toEqual(['0.75 in', '1 in', '1.25 in', '1.5 in']);
    expect(rows()[0]).toMatch(/narrow|over/);
  });

  it('shows the workings and the drawing of the opening that is pressed', async () => {
    await open();
    await page.press('1.5 in');
    expect(page.text).toContain('How the 1.5 in row was made');
    expect(page.textsOf('app-bend-sketch title')[0]).toContain('on an opening of 1.5 in, to scale');
  });

  it('redraws with every keystroke', async () => {
    await open();
    const before = page.element.querySelector('app-bend-sketch .sheet')?.getAttribute('d');
    await page.enter('input', '16 ga');
    expect(page.element.querySelector('app-bend-sketch .sheet')?.getAttribute('d')).not.toBe(before);
  });

  it('says at the field and beside it what is wrong, and computes nothing', async () => {
    await open();
    await page.enter('input', '99 ga');
    expect(page.textsOf('.problems li')[0]).toMatch(/no steel gauge 99 here: 3 ga to 30 ga/);
    expect(page.textsOf('mat-error')[0]).toMatch(/gauge 99/);
    expect(page.all('app-fit-table')).toEqual([]);
  });

  it('says so too when it was opened by a link that cannot be read', async () => {
    const router = { thickness: '0', angle: '5' };
    await open(`/?${new URLSearchParams(router)}`);
    expect(page.all('.problems li').length).toBeGreaterThan(0);
  });

  it('turns the question round', async () => {
    await open();
    expect(page.textsOf('app-fit-limits dt')).toEqual([
      'Longest bend in this sheet on 1.25 in',
      'Thickest sheet at this length on 1.25 in',
      'Opening it would take, owned or not',
    ]);
  });

  it('lets openings be typed where the shop has no die', async () => {
    await open('/', sampleReference({ dies: [] }));
    expect(page.textsOf('.pick')).toHaveLength(5);
    expect(page.text).toContain('typed');
  });
});
