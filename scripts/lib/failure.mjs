/** Something the person at the keyboard can act on: printed as its message alone, without a stack. */
export class Failure extends Error {
  name = 'Failure'
}

/** Work that was given up because the run is ending; nobody needs to hear about it. */
export class Stopped extends Failure {
  name = 'Stopped'
}
