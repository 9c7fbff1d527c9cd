/** Numbers for people, as the command line writes them. */
export { formatNumber, formatTime, massText } from '../../sim/index.ts';
