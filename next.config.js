/** @type {import('next').NextConfig} */
const config = {
  output: 'standalone',
  poweredByHeader: false,
  reactStrictMode: true,
  agentRules: false,
  // The address that the starter prints; without it the development server keeps its updates to itself.
  allowedDevOrigins: ['127.0.0.1'],
  // Types, tests included, are a step of their own in the test run.
  typescript: { ignoreBuildErrors: true },
  outputFileTracingIncludes: { '/*': ['./services/pdf/fonts/**'] },
  serverExternalPackages: [
    'sequelize',
    'mariadb',
    'umzug',
    'sharp',
    'pdf-lib',
    '@pdf-lib/fontkit',
    '@node-rs/argon2',
    '@peculiar/x509',
    'reflect-metadata',
    'bwip-js',
    'dicom-parser',
    'nodemailer',
  ],
};

export default config;
