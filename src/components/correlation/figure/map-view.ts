/** What the cells of the map show. */
export type MapView = 'density' | 'coupling'
