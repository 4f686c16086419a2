/** What browsers offer and no screen of ours uses; only names that Chromium knows on every platform, since it reports others on each page. */
const unused = [
  'accelerometer', 'autoplay', 'camera', 'display-capture', 'encrypted-media', 'fullscreen', 'gamepad', 'geolocation',
  'gyroscope', 'hid', 'magnetometer', 'microphone', 'midi', 'payment', 'picture-in-picture', 'screen-wake-lock', 'serial', 'usb',
  'xr-spatial-tracking',
]

/** Headers of every answer. Strict transport is asked for only where the public address has TLS. */
export function standingHeaders(origin: string): Record<string, string> {
  return {
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
    'cross-origin-opener-policy': 'same-origin',
    'cross-origin-resource-policy': 'same-origin',
    'permissions-policy': unused.map(feature => `${feature}=()`).join(', '),
    'x-frame-options': 'DENY',
    ...(origin.startsWith('https://') ? { 'strict-transport-security': 'max-age=31536000; includeSubDomains' } : {}),
  }
}

/** For answers that are no page: nothing in them may load or run anything. */
export const dataPolicy = 'default-src \'none\'; frame-ancestors \'none\'; base-uri \'none\'; form-action \'none\''

/**
 * The content policy of one page. `development` loosens it as far as hot reload needs: inline styles, evaluated modules and a
 * socket.
 */
export function pagePolicy(nonce: string, development: boolean): string {
  return [
    'default-src \'self\'',
    development ? 'script-src \'self\' \'unsafe-inline\' \'unsafe-eval\'' : `script-src 'nonce-${nonce}' 'strict-dynamic'`,
    development ? 'style-src \'self\' \'unsafe-inline\'' : `style-src 'self' 'nonce-${nonce}'`,
    // Server-rendered style attributes, such as the mark on the kidney strip.
    'style-src-attr \'unsafe-inline\'',
    'img-src \'self\' data:',
    development ? 'connect-src \'self\' ws: wss:' : 'connect-src \'self\'',
    'object-src \'none\'',
    'base-uri \'none\'',
    'frame-ancestors \'none\'',
    'form-action \'self\'',
  ].join('; ')
}

/** Puts the nonce on the script, style and link tags of a part of the page that the framework wrote. */
export function stampNonce(chunk: string, nonce: string): string {
  return chunk.replace(/<(script|style|link)(?=[\s>])(?![^>]*\snonce=)/g, `<$1 nonce="${nonce}"`)
}
