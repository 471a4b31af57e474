export * from './bench';
export * from './clocks';
export * from './decide';
export * from './field-joints';
export * from './limits';
export * from './minutes';
export * from './step';
