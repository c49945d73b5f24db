export * from './lib/context';
