export { coordinateBisection, randomGrowth } from './baselines';
export { bitsOf, fieldJointsOf, netOf } from './net';
export type { Net } from './net';
export { BALANCE, partition } from './partition';
export type { Control, Partition, PartitionInput } from './partition';
