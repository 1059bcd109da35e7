/** @type {import('next').NextConfig} */
const config = {
  poweredByHeader: false,
  reactStrictMode: true,
  // pino and pg load parts of themselves by file name, which a bundle breaks
  serverExternalPackages: ['pino', 'pg', 'better-auth'],
  // npm test checks the types of everything, the pages among it; a start need not do it once more
  typescript: { ignoreBuildErrors: true },
  devIndicators: false,
};
export default config;
