/** Numbers for people, as the command line writes them. */
export { formatNumber, formatTime } from '../../sim/index.ts';
