export * from './bench';
export * from './clocks';
export * from './decide';
export * from './minutes';
export * from './step';
