import type { FormRefusalCode } from './form'

/** How a form says that it does not fit; `fitForm` turns it into a result, so that it never leaves this folder. */
export class RefusedForm extends Error {
  override readonly name = 'RefusedForm'

  constructor(
    readonly code: FormRefusalCode,
    message: string,
  ) {
    super(message)
  }
}
