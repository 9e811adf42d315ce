const everywhere = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Referrer-Policy', value: 'strict-origin-when-cross-origin' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'camera=(), microphone=(), geolocation=(), payment=(), usb=()' },
];

/** Pages get their policy, with a nonce, from `proxy.ts`; data needs none of what it allows. */
const data = [{ key: 'Content-Security-Policy', value: "default-src 'none'; frame-ancestors 'none'" }];

/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  devIndicators: false,
  headers: async () => [
    { source: '/:path*', headers: everywhere },
    { source: '/api/:path*', headers: data },
  ],
};

export default config;
