/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  // The tests build beside a running app; each build keeps its own folder.
  distDir: process.env.OHMSTEAD_BUILD_DIR ?? '.next',
  serverExternalPackages: ['sequelize', 'pg-hstore', 'pdfkit'],
};

export default config;
