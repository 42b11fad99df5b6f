/** The names of the component kinds: the line heads that declare a component. */
export const KIND_NAMES = [
  'fluid', 'reservoir', 'drive', 'pump', 'relief', 'unloading', 'sequence', 'counterbalance', 'reducing', 'check', 'pilotcheck',
  'burst', 'shuttle', 'directional', 'deceleration', 'throttle', 'divider', 'shutoff', 'coupling', 'cylinder', 'motor', 'rotary',
  'brake', 'accumulator', 'intensifier', 'filter', 'cooler', 'heater', 'switch', 'sensor', 'gauge',
] as const;
export type KindName = (typeof KIND_NAMES)[number];
