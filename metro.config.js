const path = require('path');
const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(__dirname);
const previous = config.resolver.resolveRequest;
config.resolver.resolveRequest = (context, name, platform) => {
  // zod carries some fifty locale files (about 40 kB gzip) that Metro cannot shake off; English is the only one shown.
  if (name.endsWith('/locales/index.js') && /node_modules\/zod\//.test(context.originModulePath)) {
    return { type: 'sourceFile', filePath: path.join(__dirname, 'shared/zodLocales.js') };
  }
  return (previous ?? context.resolveRequest)(context, name, platform);
};
// The database, build output and other clones never belong to the bundle.
config.resolver.blockList = [/\/\.data\/.*/];
module.exports = config;
