/** Something the person at the keyboard can act on: printed as its message alone, without a stack. */
export class Failure extends Error {
  name = 'Failure'
}
