export { InvalidInputError, type InputPlace, type InvalidInputCode } from './invalid-input-error'
