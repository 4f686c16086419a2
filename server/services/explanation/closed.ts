import type { Policy } from '#shared/domain/policy/types'
import { ServiceError } from '../errors'

type Department = Policy['department']

/** Whom to call; part of every refusal, since the page knows nobody yet. */
function contact({ name, phone, callHours }: Department): { department: Pick<Department, 'name' | 'phone' | 'callHours'> } {
  return { department: { name, phone, callHours } }
}

/** One answer for links that are unknown, expired, revoked or used up, so that nobody learns which of them it was. */
export class ExplanationClosed extends ServiceError {
  constructor(department: Department) {
    super('explanation-closed', 404, 'This link does not open',
      `The link may be too old, or it was replaced by a newer one. Call ${department.name} at ${department.phone}, and we will help you.`,
      contact(department))
  }
}

/** The date is wrong; the link is still good for another try. */
export class WrongBirthDate extends ServiceError {
  constructor(department: Department) {
    super('wrong-birth-date', 422, 'Please check the date',
      `This date of birth does not match. Check it and try again, or call ${department.name} at ${department.phone}.`,
      { errors: [{ path: 'birthDate', message: 'This date of birth does not match.' }], ...contact(department) })
  }
}
