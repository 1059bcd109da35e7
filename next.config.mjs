/** @type {import('next').NextConfig} */
const config = {
  poweredByHeader: false,
  reactStrictMode: true,
  // pino and pg load parts of themselves by file name, which a bundle breaks
  serverExternalPackages: ['pino', 'pg', 'better-auth'],
  typescript: { ignoreBuildErrors: false },
  devIndicators: false,
};
export default config;
