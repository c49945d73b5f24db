import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { type Role, type RollupStatus, type Session } from '@brakeven/contract';
import { SHOP_FORMAT } from '@brakeven/ui';
import { SessionStore } from '../session/session-store';
import { RollupChip } from './rollup-chip';
import { RollupStore } from './rollup-store';
import { Shell } from './shell';

@Component({ template: 'a page', changeDetection: ChangeDetectionStrategy.OnPush })
class Page {}

const shop = {
  shopId: 's',
  name: 'Tern Hollow Fabrication',
  timeZone: 'America/Chicago',
  currency: 'CAD',
  units: 'metric',
};

const provideSession = (role: Role, mustChangePassword = false) => ({
  provide: SessionStore,
  useValue: {
    shop: signal(shop),
    user: signal<Partial<Session['user']>>({ name: 'Mara Odell', role, mustChangePassword }),
    shopFormat: signal(shop),
    can: (permission: string) => permission === 'rollup.run' && role === 'owner',
  },
});

describe('Shell', () => {
  const render = async (role: Role, mustChangePassword = false) => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([
          { path: 'hours', component: Page },
          { path: 'jobs', component: Page },
        ]),
        provideSession(role, mustChangePassword),
      ],
    });
    await TestBed.inject(Router).navigateByUrl('/hours');
    HTMLDialogElement.prototype.showModal = function () {
      this.open = true;
    };
    HTMLDialogElement.prototype.close = function () {
      this.open = false;
    };
    const fixture = TestBed.createComponent(Shell);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    document.body.append(element);
    return { fixture, element };
  };

  it('names the shop and shows its figures in its currency and units', async () => {
    const { element } = await render('owner');
    expect(element.querySelector('.shop')?.textContent).toBe('Tern Hollow Fabrication');
    expect(TestBed.inject(SHOP_FORMAT)()).toMatchObject({ currency: 'CAD', units: 'metric' });
  });

  it('shows each role its own pages and marks the one that is open', async () => {
    const { element } = await render('operator');
    const links = [...element.querySelectorAll<HTMLElement>('.rail a')];
    expect(links.map((link) => link.textContent?.trim())).toEqual(['Hours', 'Forming']);
    expect(links[0]?.getAttribute('aria-current')).toBe('page');
  });

  it('shows no pages before a temporary password is changed', async () => {
    const { element } = await render('owner', true);
    expect(element.querySelector('.rail')).toBeNull();
  });

  it('leads the keyboard past bar and rail', async () => {
    const { element } = await render('owner');
    element.querySelector<HTMLElement>('.skip')?.click();
    expect(document.activeElement?.id).toBe('page');
  });

  it('closes the drawer and goes on at the page when another one opens', async () => {
    const { fixture, element } = await render('owner');
    const drawer = element.querySelector('dialog');
    element.querySelector<HTMLElement>('.menu')?.click();
    expect(drawer?.open).toBe(true);
    await TestBed.inject(Router).navigateByUrl('/jobs');
    await fixture.whenStable();
    expect(drawer?.open).toBe(false);
    expect(document.activeElement?.id).toBe('page');
  });
});

describe('RollupChip', () => {
  const render = async (role: Role, status: Partial<RollupStatus>) => {
    const runs: number[] = [];
    const rollup = {
      status: signal(status),
      isRunning: signal(false),
      refresh: () => Promise.resolve(),
      run: () => Promise.resolve(runs.push(1)),
    };
    TestBed.configureTestingModule({
      providers: [provideSession(role), { provide: RollupStore, useValue: rollup }],
    });
    const fixture = TestBed.createComponent(RollupChip);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    return { fixture, element, rollup, runs, text: () => element.textContent?.replace(/\s+/g, ' ').trim() };
  };

  it('says through which day costs are rolled up, and what has come since', async () => {
    const { text } = await render('lead', { through: '2026-11-26', entriesWaiting: 1400 });
    expect(text()).toBe('Costs through Thu, Nov 26, 2026 · 1,400 entries since');
  });

  it('lets those roll up who may, one run at a time', async () => {
    const { fixture, element, rollup, runs, text } = await render('owner', {
      through: null,
      entriesWaiting: 1,
    });
    expect(text()).toBe('No costs yet · 1 entry since Roll up now');
    element.querySelector('button')?.click();
    rollup.isRunning.set(true);
    await fixture.whenStable();
    element.querySelector('button')?.click();
    expect(runs).toHaveLength(1);
    expect(text()).toContain('Rolling up…');
  });
});
