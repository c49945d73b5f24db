import { COST_CATEGORIES } from './entry-lines';
import { RULES } from './rules';

it('every category of lines has its rule in words, and says how it rounds', () => {
  for (const category of COST_CATEGORIES)
    expect(RULES[category]).toMatch(/^Hours .* rounded half-up to the cent/);
});

it('every rule is a sentence', () => {
  for (const rule of Object.values(RULES)) expect(rule).toMatch(/^[A-Z].*\.$/);
});
