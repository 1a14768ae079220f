/** Goes up with every change that can change a figure; stored with what was computed. */
export const ENGINE_VERSION = '1.0.0'
