/**
 * The content security policy of the window in both hosts: everything from the program's own place, nothing inline,
 * no code from text. `blob:` is for pictures and films that the page makes and for files picked in a browser;
 * 'wasm-unsafe-eval' lets WebAssembly be compiled, which 'self' alone forbids, and allows nothing else.
 */
export const CONTENT_SECURITY_POLICY = [
  "default-src 'none'",
  "script-src 'self' 'wasm-unsafe-eval'",
  "style-src 'self'",
  "img-src 'self' blob: data:",
  "font-src 'self'",
  "media-src 'self' blob:",
  "connect-src 'self' blob:",
  "worker-src 'self'",
  "manifest-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
  "object-src 'none'",
].join('; ');

// Every feature a page could ask the user or the machine for; the clipboard may be written to, for the ledger.
const REFUSED_FEATURES = [
  'accelerometer',
  'autoplay',
  'bluetooth',
  'camera',
  'clipboard-read',
  'display-capture',
  'encrypted-media',
  'gamepad',
  'geolocation',
  'gyroscope',
  'hid',
  'idle-detection',
  'local-fonts',
  'magnetometer',
  'microphone',
  'midi',
  'payment',
  'publickey-credentials-get',
  'screen-wake-lock',
  'serial',
  'usb',
  'window-management',
  'xr-spatial-tracking',
];

/**
 * Headers of EVERY answer in both hosts, errors too: a worker script without them does not load in an isolated page.
 * COOP and COEP isolate the page, which gives it shared memory (HTML standard, "cross-origin isolation").
 */
export const PAGE_HEADERS: Readonly<Record<string, string>> = {
  'content-security-policy': CONTENT_SECURITY_POLICY,
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-embedder-policy': 'require-corp',
  'cross-origin-resource-policy': 'same-origin',
  'permissions-policy': REFUSED_FEATURES.map((feature) => `${feature}=()`).join(', '),
  'referrer-policy': 'no-referrer',
  'x-content-type-options': 'nosniff',
  'x-frame-options': 'DENY',
  'cache-control': 'no-store',
};
