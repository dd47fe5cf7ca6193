/** The projections that figures use of d3-geo-projection, which ships no types. */
declare module 'd3-geo-projection' {
  import type { GeoProjection } from 'd3-geo'

  export function geoHammer(): GeoProjection
  export function geoAitoff(): GeoProjection
  export function geoMollweide(): GeoProjection
}
