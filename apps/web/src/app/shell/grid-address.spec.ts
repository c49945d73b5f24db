import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { injectGridAddress, toGridOrder } from './grid-address';

@Component({ template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Page {
  readonly address = injectGridAddress();
}

describe('injectGridAddress', () => {
  const setUp = async () => {
    window.matchMedia = jest.fn().mockReturnValue({ matches: true });
    TestBed.configureTestingModule({ providers: [provideRouter([{ path: '**', children: [] }])] });
    await TestBed.inject(Router).navigateByUrl('/runs?machineId=m1&page=2');
    return TestBed.createComponent(Page);
  };
  const url = () => TestBed.inject(Router).url;
  const pass = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));

  it('keeps what else is asked when one thing changes, and takes out what is no longer asked', async () => {
    const { address } = (await setUp()).componentInstance;
    expect(address.isNarrow).toBe(true);
    address.ask({ machineId: null, materialCode: 'a36' });
    await pass(0);
    expect(url()).toBe('/runs?page=2&materialCode=a36');
  });

  it('searches once nobody types on, and not after the page is gone', async () => {
    const fixture = await setUp();
    const { address } = fixture.componentInstance;
    address.searchFor('ho');
    address.searchFor(' hopper ');
    expect(url()).not.toContain('search');
    await pass(350);
    expect(url()).toContain('search=hopper');
    address.searchFor('gone');
    fixture.destroy();
    await pass(350);
    expect(url()).toContain('search=hopper');
  });
});

describe('toGridOrder', () => {
  it('is what the address asks for, else the usual one', () => {
    const usual = { sort: 'runOn', direction: 'desc' } as const;
    expect(toGridOrder(undefined, 'asc', usual)).toBe(usual);
    expect(toGridOrder('job', 'asc', usual)).toEqual({ sort: 'job', direction: 'asc' });
    expect(toGridOrder('job', undefined, usual)).toEqual({ sort: 'job', direction: 'desc' });
  });
});
