import { HttpClient, provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component, ChangeDetectionStrategy } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { type Role, type Session } from '@brakeven/contract';
import { authGuard, homeGuard, permissionGuard } from './auth-guard';
import { Notifier } from '../shell/notifier';
import { sessionInterceptor } from './session-interceptor';
import { SessionStore } from './session-store';

@Component({ template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Page {}

const sessionOf = (role: Role, mustChangePassword = false): Session => ({
  user: { userId: 'u', name: 'Mara Odell', email: 'mara@ternhollow.example', role, mustChangePassword },
  shop: {
    shopId: 's',
    name: 'Tern Hollow Fabrication',
    timeZone: 'America/Chicago',
    currency: 'CAD',
    units: 'metric',
    weekStart: 0,
    overtimeThresholdHours: '40.00',
    overtimeTo: 'overhead',
  },
});

describe('the session', () => {
  let http: HttpTestingController;
  let router: Router;
  let store: SessionStore;

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([sessionInterceptor])),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'sign-in', component: Page },
          {
            path: '',
            canActivate: [authGuard],
            canActivateChild: [permissionGuard],
            children: [
              { path: '', pathMatch: 'full', canActivate: [homeGuard], children: [] },
              { path: 'payback', component: Page, data: { permission: 'payback.view' } },
              { path: 'timesheets', component: Page, data: { permission: 'timesheets.use' } },
              { path: 'hours', component: Page, data: { permission: 'hours.own' } },
              { path: 'account', component: Page, data: { permission: 'session.own' } },
              { path: 'not-allowed', component: Page },
            ],
          },
        ]),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    router = TestBed.inject(Router);
    store = TestBed.inject(SessionStore);
  });

  const signInAs = async (role: Role, mustChangePassword = false) => {
    const signedIn = store.signIn('mara@ternhollow.example', 'secret');
    http
      .expectOne({ method: 'GET', url: '/api/session' })
      .flush({}, { status: 401, statusText: 'Unauthorized' });
    await new Promise((resolve) => setTimeout(resolve));
    http.expectOne({ method: 'POST', url: '/api/session' }).flush(sessionOf(role, mustChangePassword));
    await signedIn;
  };

  it('is asked for once, whoever waits for it, and knows nobody after a 401', async () => {
    const both = Promise.all([store.load(), store.load()]);
    http.expectOne('/api/session').flush({}, { status: 401, statusText: 'Unauthorized' });
    expect(await both).toEqual([null, null]);
    expect(store.can('hours.own')).toBe(false);
  });

  it('rejects when the server is out of reach, which is not the same as signed out', async () => {
    const loading = store.load();
    http.expectOne('/api/session').error(new ProgressEvent('error'));
    await expect(loading).rejects.toMatchObject({ status: 0 });
  });

  it('gives figures the shop’s currency and units, and forgets them on sign-out', async () => {
    await signInAs('owner');
    expect(store.shopFormat()).toMatchObject({ currency: 'CAD', units: 'metric' });
    const signedOut = store.signOut();
    http.expectOne({ method: 'DELETE', url: '/api/session' }).flush(null);
    await signedOut;
    expect(store.session()).toBeNull();
    expect(store.shopFormat().currency).toBe('USD');
  });

  it('leads strangers to sign-in, and remembers where they wanted to go', async () => {
    const navigated = router.navigateByUrl('/payback?machine=P2');
    await new Promise((resolve) => setTimeout(resolve));
    http.expectOne('/api/session').flush({}, { status: 401, statusText: 'Unauthorized' });
    await navigated;
    expect(router.parseUrl(router.url).queryParams).toEqual({ returnTo: '/payback?machine=P2' });
  });

  it.each<[Role, string]>([
    ['owner', '/payback'],
    ['bookkeeper', '/timesheets'],
    ['operator', '/hours'],
  ])('brings the %s to %s', async (role, path) => {
    await signInAs(role);
    await router.navigateByUrl('/');
    expect(router.url).toBe(path);
  });

  it('shows an operator no page about money, at its own address', async () => {
    await signInAs('operator');
    const shown: string[] = [];
    router.events.subscribe(
      (event) => 'urlAfterRedirects' in event && shown.push(String(event.urlAfterRedirects)),
    );
    await router.navigateByUrl('/payback');
    expect(shown.at(-1)).toBe('/not-allowed');
  });

  it('lets nobody past a temporary password', async () => {
    await signInAs('owner', true);
    await router.navigateByUrl('/hours');
    expect(router.url).toBe('/account');
  });

  it('goes to sign-in when the session has run out, and back to the page afterwards', async () => {
    await signInAs('owner');
    await router.navigateByUrl('/hours');
    TestBed.inject(HttpClient)
      .get('/api/entries')
      .subscribe({ error: () => undefined });
    http.expectOne('/api/entries').flush({}, { status: 401, statusText: 'Unauthorized' });
    await new Promise((resolve) => setTimeout(resolve));
    expect(store.session()).toBeNull();
    expect(router.parseUrl(router.url).queryParams).toEqual({ returnTo: '/hours', expired: 'true' });
  });

  it('keeps the shop’s units for somebody who stays with unsaved work after the session has run out', async () => {
    await signInAs('owner');
    await router.navigateByUrl('/hours');
    const stays = jest.spyOn(router, 'navigate').mockResolvedValue(false);
    TestBed.inject(HttpClient)
      .get('/api/entries')
      .subscribe({ error: () => undefined });
    http.expectOne('/api/entries').flush({}, { status: 401, statusText: 'Unauthorized' });
    await new Promise((resolve) => setTimeout(resolve));
    expect(stays).toHaveBeenCalledTimes(1);
    expect(store.session()).not.toBeNull();
    expect(TestBed.inject(Notifier).notice()?.text).toContain('Sign in in another tab');
  });

  it('leaves other refusals to whoever asked', async () => {
    await signInAs('owner');
    const statuses: number[] = [];
    TestBed.inject(HttpClient)
      .get('/api/jobs')
      .subscribe({ error: (error: { status: number }) => statuses.push(error.status) });
    http.expectOne('/api/jobs').flush({}, { status: 403, statusText: 'Forbidden' });
    expect(statuses).toEqual([403]);
    expect(store.session()).not.toBeNull();
  });
});
