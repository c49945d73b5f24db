import { findFileProblem, formatBytes } from './find-file-problem';

const rule = { endings: ['.xlsx', '.csv'], bytesMax: 10 * 1024 * 1024 };

describe('findFileProblem', () => {
  it('takes the endings it knows, whatever their case', () => {
    expect(findFileProblem({ name: 'week 48.XLSX', size: 9000 }, rule)).toBeNull();
    expect(findFileProblem({ name: 'week.csv', size: 1 }, rule)).toBeNull();
  });

  it('says how to turn an old workbook into one that can be read', () => {
    expect(findFileProblem({ name: 'week.xls', size: 9000 }, rule)).toMatch(/\.xls file.*save it as \.xlsx/);
  });

  it('names the endings when the file is something else', () => {
    expect(findFileProblem({ name: 'photo.jpg', size: 9000 }, rule)).toMatch(/ends in \.xlsx or \.csv/);
    expect(findFileProblem({ name: 'noending', size: 9000 }, rule)).toMatch(/ends in \.xlsx or \.csv/);
  });

  it('refuses an empty file and one over the limit, with both sizes', () => {
    expect(findFileProblem({ name: 'week.xlsx', size: 0 }, rule)).toMatch(/is empty/);
    expect(findFileProblem({ name: 'week.xlsx', size: rule.bytesMax }, rule)).toBeNull();
    expect(findFileProblem({ name: 'week.xlsx', size: 12 * 1024 * 1024 }, rule)).toMatch(
      /12 MB; the most is 10 MB/,
    );
  });
});

describe('formatBytes', () => {
  it('uses the unit that fits', () => {
    expect([900, 421_888, 3_565_158].map(formatBytes)).toEqual(['900 bytes', '412 KB', '3.4 MB']);
  });
});
