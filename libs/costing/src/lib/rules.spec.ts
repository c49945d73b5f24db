import { COST_CATEGORIES } from './cost-categories';
import { RULES } from './rules';

it('every category of lines has its rule in words, and says how it rounds or that it does not', () => {
  for (const category of COST_CATEGORIES)
    expect(RULES[category]).toMatch(/rounded half-up to the cent|, as entered\.$/);
});

it('every rule is a sentence', () => {
  for (const rule of Object.values(RULES)) expect(rule).toMatch(/^[A-Z].*\.$/);
});
