const path = require('path');
const { getDefaultConfig } = require('expo/metro-config');

// Parts of packages that no screen uses and that Metro cannot shake off by itself: what is asked for, who asks, what stands in.
const leftOut = (file) => path.join(__dirname, 'components/shell/leftOut', file);
const standIns = [
  // Some fifty locale files (about 40 kB gzip); English is the only one shown.
  { ask: /\/locales\/index\.js$/, from: /node_modules\/zod\//, use: path.join(__dirname, 'shared/zodLocales.js') },
  { ask: /\/compile\.js$/, from: /node_modules\/zod\/v4\//, use: leftOut('zodCompile.js') },
  { ask: /\/(json-schema-processors|to-json-schema|json-schema-generator|from-json-schema)\.js$/, from: /node_modules\/zod\/v4\//, use: leftOut('zodJsonSchema.js') },
  { ask: /\/layouts\/(Tabs|experimental-stack)$/, from: /node_modules\/expo-router\/build\/exports\.js$/, use: leftOut('routerNavigators.js') },
  { ask: /\/react-navigation\/bottom-tabs$/, from: /node_modules\/expo-router\/build\/views\//, use: leftOut('routerNavigators.js') },
  { ask: /\/stack-utils$/, from: /node_modules\/expo-router\/build\/layouts\/Stack(Client|\.web)\.js$/, use: leftOut('routerNavigators.js') },
  { ask: /\/native-stack\/createNativeStackNavigator$/, from: /node_modules\/expo-router\/build\/layouts\/StackClient\.js$/, use: leftOut('routerNavigators.js') },
  { ask: /^\.\/(xml|deprecated|utils\/fetchData)$/, from: /node_modules\/react-native-svg\/lib\/module\/ReactNativeSVG\.web\.js$/, use: leftOut('svgFromText.js') },
  { ask: /^\.\/(hydration|queriesObserver|streamedQuery|useQueries|useSuspense\w+|usePrefetch\w+|HydrationBoundary|useIsFetching|useMutationState)\.js$/, from: /@tanstack\/(query-core|react-query)\/build\/\w+\/index\.js$/, use: leftOut('nothing.js') },
];

const config = getDefaultConfig(__dirname);
const previous = config.resolver.resolveRequest;
config.resolver.resolveRequest = (context, name, platform) => {
  const standIn = standIns.find(({ ask, from }) => ask.test(name) && from.test(context.originModulePath));
  if (standIn) return { type: 'sourceFile', filePath: standIn.use };
  return (previous ?? context.resolveRequest)(context, name, platform);
};
// The database, build output and other clones never belong to the bundle.
config.resolver.blockList = [/\/\.data\/.*/];
module.exports = config;
