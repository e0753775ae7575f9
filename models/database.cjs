/** Settings for sequelize-cli; the app itself connects in `sequelize.ts`. */
const settings = { use_env_variable: 'DATABASE_URL', dialect: 'postgres', logging: false };

module.exports = { development: settings, test: settings, production: settings };
