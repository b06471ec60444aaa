// Stands in for the parts of react-native-svg that make drawings of text and of files (about 5 kB gzip): the drawings here are components.
function NotInBundle() {
  throw new Error('Drawings from text are left out of the web bundle (metro.config.js): write the drawing as a component.');
}

export {
  NotInBundle as camelCase, NotInBundle as fetchText, NotInBundle as parse, NotInBundle as SvgAst, NotInBundle as SvgFromUri, NotInBundle as SvgFromXml, NotInBundle as SvgUri, NotInBundle as SvgXml,
  NotInBundle as inlineStyles, NotInBundle as loadLocalRawResource, NotInBundle as LocalSvg, NotInBundle as SvgCss, NotInBundle as SvgCssUri, NotInBundle as SvgWithCss, NotInBundle as SvgWithCssUri,
  NotInBundle as WithLocalSvg,
};
