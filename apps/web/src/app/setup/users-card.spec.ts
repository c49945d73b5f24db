import { TestBed } from '@angular/core/testing';
import { MatDialog } from '@angular/material/dialog';
import { type User } from '@brakeven/contract';
import { of } from 'rxjs';
import { PeopleApi } from '../api/people-api';
import { ShopApi } from '../api/shop-api';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { UserDialog } from './user-dialog';
import { UsersCard } from './users-card';

const mara: User = {
  userId: 'user-1',
  name: 'Mara Oduya',
  email: 'mara@ternhollow.example',
  role: 'owner',
  employeeId: null,
  isActive: true,
  mustChangePassword: false,
  lastSignInAt: null,
};
const jo: User = { ...mara, userId: 'user-2', name: 'Jo Alvarez', role: 'operator', employeeId: 'e1' };
const overlay = () => document.querySelector<HTMLElement>('mat-dialog-container:last-of-type');
const settle = () => new Promise((resolve) => setTimeout(resolve, 250));

describe('UsersCard', () => {
  const api = {
    listUsers: jest.fn(),
    createUser: jest.fn(),
    updateUser: jest.fn(),
    resetPassword: jest.fn(),
  };

  beforeEach(() => {
    jest.resetAllMocks();
    api.listUsers.mockReturnValue(of([mara, jo]));
    const people = { listEmployees: () => of([{ employeeId: 'e1', number: '104', name: 'Jo Alvarez' }]) };
    TestBed.configureTestingModule({
      providers: [
        provideSession('owner'),
        { provide: ShopApi, useValue: api },
        { provide: PeopleApi, useValue: people },
      ],
    });
  });
  afterEach(async () => {
    TestBed.inject(MatDialog).closeAll();
    await settle();
  });

  it('says who is who, what each role may see, and offers nobody a new password for themselves', async () => {
    const page = await render(UsersCard);
    expect(page.textsOf('tbody tr')[0]).toContain('Mara Oduya you');
    expect(page.textsOf('tbody tr')[1]).toContain('Jo Alvarez');
    expect(page.textsOf('dt')).toEqual(['Owner', 'Bookkeeper', 'Lead', 'Operator']);
    expect(() => page.find('New password for Mara Oduya')).toThrow();
  });

  it('shows a new temporary password once, after asking', async () => {
    api.resetPassword.mockReturnValue(of({ user: jo, temporaryPassword: 'brisk-lathe-71-meadow' }));
    const page = await render(UsersCard);
    await page.press('New password for Jo Alvarez');
    expect(api.resetPassword).not.toHaveBeenCalled();
    [...(overlay()?.querySelectorAll('button') ?? [])].at(-1)?.click();
    await settle();
    expect(document.querySelector('code')?.textContent).toBe('brisk-lathe-71-meadow');
  });

  it('says beside the role what it may see, and adds the user with it', async () => {
    api.createUser.mockReturnValue(of({ user: jo, temporaryPassword: 'x' }));
    TestBed.inject(MatDialog).open(UserDialog, { data: { user: null, employees: [] } });
    TestBed.tick();
    await settle();
    const [name, email] = [...(overlay()?.querySelectorAll('input') ?? [])];
    const role = overlay()?.querySelector('select');
    const enter = (
      field: HTMLInputElement | HTMLSelectElement | null | undefined,
      value: string,
      event: string,
    ) => {
      if (!field) throw new Error('A field is missing.');
      field.value = value;
      field.dispatchEvent(new Event(event));
    };
    enter(name, 'Ann Roe', 'input');
    enter(email, 'ann@ternhollow.example', 'input');
    enter(role, 'lead', 'change');
    TestBed.tick();
    expect(overlay()?.textContent).toContain('without any money or wage');
    overlay()?.querySelector<HTMLButtonElement>('button[type=submit]')?.click();
    expect(api.createUser).toHaveBeenCalledWith({
      name: 'Ann Roe',
      email: 'ann@ternhollow.example',
      role: 'lead',
      employeeId: null,
    });
  });
});
