import { toQueryParams } from './query-params';

describe('toQueryParams', () => {
  it('sends what is set, 0 and false included, and leaves out the rest', () => {
    const params = toQueryParams({
      search: 'a&b',
      cursor: undefined,
      status: null,
      job: '',
      limit: 0,
      all: false,
    });
    expect(params.toString()).toBe('search=a%26b&limit=0&all=false');
  });
});
