export * from './decide-lend';
