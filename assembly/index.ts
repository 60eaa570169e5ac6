// Everything that the kernel module offers to its host: functions over numbers only.
export { exp, log, pow } from './mathematics';
