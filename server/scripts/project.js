const { join, resolve } = require('node:path');

/** The folder that holds package.json. */
const projectFolder = resolve(__dirname, '../..');

/** What a run leaves behind: the database, logs, the demonstration's secrets. Never committed. */
const dataFolder = join(projectFolder, '.data');

module.exports = { projectFolder, dataFolder };
