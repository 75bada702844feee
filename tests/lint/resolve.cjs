const { join } = require('node:path');

/** Tells the import check what `$lib` stands for; the framework's own tsconfig is not there before its first run. */
module.exports = { resolve: { alias: { $lib: join(__dirname, '..', '..', 'src', 'lib') } } };
