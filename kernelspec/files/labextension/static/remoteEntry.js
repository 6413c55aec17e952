// Tells JupyterLab how the notation of Adjoin is coloured. The notebook's own
// copies of its editor are used, through the scope that it shares with
// extensions, so that nothing has to be built or fetched.
(function () {
  'use strict';
  var NAME = 'adjoin-notation';
  var KEYWORDS = /^(?:let|where|for|in|of|over|by|to|at|from|with|as|is|not|and|or|if|then|else|claim|mod|divides)(?![\p{L}\p{Nd}_'])/u;
  var STATEMENTS = /^(?:say|explain|clear output)(?![\p{L}\p{Nd}_'])/u;

  // What stands at the beginning of the rest of a line, as a kind of token that
  // the editor knows; null leaves it uncoloured.
  function token(stream) {
    var start = stream.sol() || /^\s*$|;\s*$/.test(stream.string.slice(0, stream.pos));
    if (stream.eatSpace()) return null;
    if (stream.match(/^#.*/)) return 'comment';
    if (stream.match(/^"(?:[^"\\]|\\.)*"?/)) return 'string';
    if (stream.match(/^0[xX][0-9a-fA-F_]+|^0[bB][01_]+|^[0-9][0-9_]*|^[⁰¹²³⁴-⁹₀-₉]+/)) return 'number';
    if (start && stream.match(STATEMENTS)) return 'keyword';
    if (stream.match(KEYWORDS)) return 'keyword';
    if (stream.match(/^\p{Ll}{2,}(?![\p{L}\p{Nd}_'])/u)) return 'variableName.standard';
    if (stream.match(/^\p{L}[\p{L}\p{Nd}_']*/u)) return 'variableName';
    if (stream.match(/^[()[\]{}]/)) return 'bracket';
    stream.next();
    return 'operator';
  }

  var scope = {};

  // The module that the notebook shares under a name, in its newest version.
  function shared(name) {
    var versions = scope[name];
    if (!versions) return Promise.reject(new Error(name + ' is not shared'));
    var newest = Object.keys(versions).sort(function (a, b) { return a.localeCompare(b, undefined, { numeric: true }); }).pop();
    return Promise.resolve(versions[newest].get()).then(function (factory) { return factory(); });
  }

  function plugin(codemirror, language) {
    return {
      id: NAME + ':plugin',
      description: 'Colours for the notation of Adjoin',
      autoStart: true,
      requires: [codemirror.IEditorLanguageRegistry],
      activate: function (app, registry) {
        var parser = { name: 'adjoin', token: token, languageData: { commentTokens: { line: '#' }, closeBrackets: { brackets: ['(', '[', '{', '"'] } } };
        registry.addLanguage({
          name: 'adjoin',
          displayName: 'Adjoin',
          mime: 'text/x-adjoin',
          extensions: ['adj'],
          support: new language.LanguageSupport(language.StreamLanguage.define(parser))
        });
      }
    };
  }

  (globalThis._JUPYTERLAB = globalThis._JUPYTERLAB || {})[NAME] = {
    init: function (s) { scope = s; },
    get: function () {
      return Promise.all([shared('@jupyterlab/codemirror'), shared('@codemirror/language')]).then(function (m) {
        return function () { return { __esModule: true, default: plugin(m[0], m[1]) }; };
      });
    }
  };
})();
