/** Choices of the eye: kept between visits, not part of the work, not undone. */
import type { MapQuantity } from '../worker/packet.ts';

/** Rooms of the app, in the order of the bar. */
const ROOMS = ['plant', 'upset', 'setpoint', 'drill', 'record'] as const;
export type Room = (typeof ROOMS)[number];

export interface View {
  readonly room: Room;
  readonly theme: 'auto' | 'light' | 'dark';
  readonly map: MapQuantity;
  /** Tags of instruments whose lanes are put away. */ readonly hiddenLanes: readonly string[];
  /** Whether strengths stand on a logarithmic scale in the answer lane. */ readonly isLog: boolean;
  /** Part of the time axis that is shown, s from the start; undefined: all of it. */
  readonly window: readonly [number, number] | undefined;
}

export const FIRST_VIEW: View = {
  room: 'upset',
  theme: 'auto',
  map: 'gas.0',
  hiddenLanes: [],
  isLog: false,
  window: undefined,
};

/** Choices from storage, as far as they are understood. */
export function asView(value: unknown): View {
  if (typeof value !== 'object' || value === null) return FIRST_VIEW;
  const { room, theme, map, hiddenLanes, isLog } = value as Partial<Record<keyof View, unknown>>;
  return {
    room: ROOMS.find((r) => r === room) ?? FIRST_VIEW.room,
    theme: theme === 'light' || theme === 'dark' ? theme : 'auto',
    map: typeof map === 'string' ? (map as MapQuantity) : FIRST_VIEW.map,
    hiddenLanes: Array.isArray(hiddenLanes) ? hiddenLanes.filter((t) => typeof t === 'string') : [],
    isLog: isLog === true,
    window: undefined,
  };
}
