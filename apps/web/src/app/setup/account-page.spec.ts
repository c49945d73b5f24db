import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { HttpErrorResponse } from '@angular/common/http';
import { of, throwError } from 'rxjs';
import { SessionApi } from '../api/session-api';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { AccountPage } from './account-page';

describe('AccountPage', () => {
  const api = { changePassword: jest.fn() };

  const open = (mustChangePassword = false) => {
    api.changePassword.mockReset();
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideSession('operator', { mustChangePassword }),
        { provide: SessionApi, useValue: api },
      ],
    });
    return render(AccountPage);
  };
  const fill = async (page: Awaited<ReturnType<typeof open>>, ...texts: string[]) => {
    page.all('input').forEach((input, index) => {
      (input as HTMLInputElement).value = texts[index] ?? '';
      input.dispatchEvent(new Event('input'));
    });
    await page.press('Change password');
  };

  it('wants a long password, another than before, and the same twice', async () => {
    const page = await open();
    await fill(page, 'short', 'short', 'shorter');
    expect(page.textsOf('mat-error')[1]).toBe('This is not the same as the new password.');
    await fill(page, 'present one', 'short', 'short');
    expect(page.textsOf('mat-error')).toEqual(['At least 12 characters.']);
    await fill(page, 'a long enough one', 'a long enough one', 'a long enough one');
    expect(page.textsOf('mat-error')).toContain('Choose another than the present one.');
    expect(api.changePassword).not.toHaveBeenCalled();
  });

  it('changes the password, and goes on where a temporary one had stopped', async () => {
    const page = await open(true);
    const navigate = jest.spyOn(TestBed.inject(Router), 'navigateByUrl').mockResolvedValue(true);
    expect(page.text).toContain('Your password is a temporary one.');
    api.changePassword.mockReturnValue(of(null));
    await fill(page, 'brisk-lathe-71', 'a long enough one', 'a long enough one');
    expect(api.changePassword).toHaveBeenCalledWith({
      currentPassword: 'brisk-lathe-71',
      newPassword: 'a long enough one',
    });
    expect(navigate).toHaveBeenCalledWith('/');
  });

  it('puts the server’s words at the field they are about', async () => {
    const page = await open();
    const issues = [
      { field: 'currentPassword', code: 'wrong', message: 'That is not the present password.' },
    ];
    const error = { code: 'password_wrong', detail: 'No.', issues };
    api.changePassword.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 422, error })));
    await fill(page, 'wrong', 'a long enough one', 'a long enough one');
    expect(page.textsOf('mat-error')).toContain('That is not the present password.');
    expect(page.all('.problem')).toHaveLength(0);
  });
});
