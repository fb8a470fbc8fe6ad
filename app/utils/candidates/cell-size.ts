/** Width of a character of the grid's data font, and what a cell takes beside its text, in pixels. */
export const characterPx = 7.3
export const paddingPx = 18
