export { quantileSorted } from './quantile'
