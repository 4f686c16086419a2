/**
 * True when `version` (`20.20.2`, a leading `v` allowed) satisfies a caret range (`^20.19.0`): same major number, not older.
 * Only the caret form is understood because package.json uses no other; anything else throws.
 *
 * @param {string} version
 * @param {string} range
 */
export function satisfiesCaret(version, range) {
  if (!/^\^\d+\.\d+\.\d+$/.test(range)) throw new Error(`Not a caret range: ${range}`)
  const [major, minor, patch] = numbers(version)
  const [wantMajor, wantMinor, wantPatch] = numbers(range.slice(1))
  if (major !== wantMajor) return false
  if (minor !== wantMinor) return minor > wantMinor
  return patch >= wantPatch
}

function numbers(version) {
  return version.replace(/^v/, '').split(/[.-]/).slice(0, 3).map(Number)
}
