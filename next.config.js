/** @type {import('next').NextConfig} */
const config = {
  output: 'standalone',
  poweredByHeader: false,
  reactStrictMode: true,
  agentRules: false,
  serverExternalPackages: ['sequelize', 'mariadb', 'umzug', 'sharp', 'pdf-lib', '@pdf-lib/fontkit', '@node-rs/argon2', 'dicom-parser', 'nodemailer'],
};

export default config;
