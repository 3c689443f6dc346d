/** Where the view is moved while frames are counted: everything in view, a storey or two, or reading distance. */
export const places = ['fit', 'middle', 'near'] as const;
export type Place = (typeof places)[number];

export const zooms: Record<Place, number> = { fit: 0.13, middle: 0.4, near: 1 };
