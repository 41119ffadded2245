/** Headers of every answer. The policy allows no inline script, no foreign origin, and inline style only as an attribute (bar lengths). */
export const security = {
  strict: false,
  headers: {
    crossOriginEmbedderPolicy: false as const,
    contentSecurityPolicy: {
      'default-src': ['\'self\''],
      'script-src': ['\'self\'', '\'strict-dynamic\'', '\'nonce-{{nonce}}\''],
      'script-src-attr': ['\'none\''],
      'style-src': ['\'self\'', '\'nonce-{{nonce}}\''],
      'style-src-attr': ['\'unsafe-inline\''],
      'font-src': ['\'self\''],
      'img-src': ['\'self\'', 'data:', 'blob:'],
      'connect-src': ['\'self\''],
      'worker-src': ['\'self\''],
      'manifest-src': ['\'self\''],
      'base-uri': ['\'none\''],
      'object-src': ['\'none\''],
      'frame-ancestors': ['\'none\''],
      'form-action': ['\'self\''],
      // A studio's own network is plain http; forcing https there would cut it off.
      'upgrade-insecure-requests': false,
    },
    strictTransportSecurity: false as const,
    // Tags are scanned and photos taken from our own pages.
    permissionsPolicy: { camera: ['self'], 'display-capture': [], fullscreen: ['self'], geolocation: [], microphone: [] },
  },
  // Our own limiter guards sign-in; a general one stops a wall tablet and a maker behind one address.
  rateLimiter: false as const,
  corsHandler: false as const,
  // It refuses bodies such as "a < b", which are ordinary notes. Vue escapes what is shown.
  xssValidator: false as const,
}
