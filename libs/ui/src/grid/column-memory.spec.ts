import { TestBed } from '@angular/core/testing';
import { ColumnMemory } from './column-memory';

describe('ColumnMemory', () => {
  let memory: ColumnMemory;

  beforeEach(() => {
    localStorage.clear();
    memory = TestBed.inject(ColumnMemory);
  });

  it('gives back what was kept, for each grid its own', () => {
    memory.keep('jobs', [{ colId: 'number', width: 90 }]);
    expect(memory.find('jobs')).toEqual([{ colId: 'number', width: 90 }]);
    expect(memory.find('hours')).toBeUndefined();
  });

  it('takes what it cannot read as nothing kept', () => {
    localStorage.setItem('brakeven.columns.jobs', '{"broken');
    expect(memory.find('jobs')).toBeUndefined();
    localStorage.setItem('brakeven.columns.jobs', '[{"width":1}]');
    expect(memory.find('jobs')).toBeUndefined();
  });

  it('forgets', () => {
    memory.keep('jobs', [{ colId: 'number' }]);
    memory.forget('jobs');
    expect(memory.find('jobs')).toBeUndefined();
  });
});
