import { ROLES } from '@brakeven/contract';
import { toInitials } from './account-menu';
import { findHomePath, listNavigation, NAVIGATION } from './navigation';

const pathsOf = (role: (typeof ROLES)[number]) =>
  listNavigation(role).flatMap((group) => group.pages.map((page) => page.path));

describe('the rail', () => {
  it('shows the owner all pages', () => {
    expect(pathsOf('owner')).toEqual(NAVIGATION.flatMap((group) => group.pages.map((page) => page.path)));
  });

  it('shows an operator the own hours and Forming, and no group without a page', () => {
    expect(pathsOf('operator')).toEqual(['/hours', '/forming']);
    expect(listNavigation('operator').map(({ label }) => label)).toEqual(['Work', 'Shop']);
    expect(listNavigation('bookkeeper')[0]?.label).toBe('Money');
  });

  it('shows the lead no wages and no payback', () => {
    expect(pathsOf('lead')).toEqual(['/jobs', '/hours', '/forming', '/machines', '/materials']);
  });

  it.each(ROLES)('leads the %s to a page that the role may open', (role) => {
    expect(pathsOf(role)).toContain(findHomePath(role));
  });
});

describe('toInitials', () => {
  it('takes the first and the last word', () => {
    expect(toInitials('Mara Odell')).toBe('MO');
    expect(toInitials('ines maría del quill')).toBe('IQ');
    expect(toInitials('Öz')).toBe('Ö');
    expect(toInitials('')).toBe('');
  });
});
