import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { Router } from '@angular/router';
import { SessionStore } from '../session/session-store';
import { SignInPage, toOwnPath } from './sign-in-page';

describe('SignInPage', () => {
  const tried: [string, string][] = [];
  const went: string[] = [];
  let refusal: unknown;

  const render = async (returnTo?: string) => {
    const fixture = TestBed.createComponent(SignInPage);
    if (returnTo) fixture.componentRef.setInput('returnTo', returnTo);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    document.body.append(element);
    const type = (id: string, text: string) => {
      const field = element.querySelector<HTMLInputElement>(`#${id}`);
      if (!field) throw new Error(`${id} is not there.`);
      field.value = text;
      field.dispatchEvent(new Event('input'));
    };
    const submit = async () => {
      element.querySelector('form')?.dispatchEvent(new Event('submit'));
      await fixture.whenStable();
      await fixture.whenStable();
    };
    return { element, type, submit };
  };

  beforeEach(() => {
    tried.length = went.length = 0;
    refusal = null;
    const session = {
      signIn: (email: string, password: string) => {
        tried.push([email, password]);
        return refusal ? Promise.reject(refusal) : Promise.resolve({});
      },
    };
    TestBed.configureTestingModule({
      providers: [
        { provide: SessionStore, useValue: session },
        { provide: Router, useValue: { navigateByUrl: (url: string) => Promise.resolve(went.push(url)) } },
      ],
    });
  });

  it('goes on to where one wanted to go', async () => {
    const { type, submit } = await render('/jobs?status=open');
    type('email', ' mara@ternhollow.example ');
    type('password', ' keeps its spaces ');
    await submit();
    expect(tried).toEqual([['mara@ternhollow.example', ' keeps its spaces ']]);
    expect(went).toEqual(['/jobs?status=open']);
  });

  it('names the field that is empty and goes there, without asking the server', async () => {
    const { element, submit } = await render();
    await submit();
    expect(tried).toEqual([]);
    expect(element.querySelector('#email-issue')?.textContent).toContain('Write your e-mail address.');
    expect(document.activeElement?.id).toBe('email');
  });

  it('shows a refusal, keeps the e-mail, and asks for the password again', async () => {
    refusal = new HttpErrorResponse({
      status: 401,
      error: { code: 'sign_in_refused', detail: 'Check both.', issues: [] },
    });
    const { element, type, submit } = await render();
    type('email', 'mara@ternhollow.example');
    type('password', 'wrong');
    await submit();
    expect(element.querySelector('.problem')?.textContent).toContain('E-mail or password is not right.');
    expect(element.querySelector<HTMLInputElement>('#email')?.value).toBe('mara@ternhollow.example');
    expect(element.querySelector<HTMLInputElement>('#password')?.value).toBe('');
    expect(document.activeElement?.id).toBe('password');
  });
});

describe('toOwnPath', () => {
  it('follows own paths only', () => {
    expect(toOwnPath('/payback?machine=P2')).toBe('/payback?machine=P2');
    for (const other of [
      'https://example.com',
      '//example.com',
      '/\\example.com',
      'javascript:alert(1)',
      undefined,
    ]) {
      expect(toOwnPath(other)).toBe('/');
    }
  });
});
