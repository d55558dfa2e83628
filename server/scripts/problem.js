/**
 * Something the person at the terminal can put right. Its message is a sentence for them and is printed
 * without a stack; any other error is a fault of ours and keeps its stack.
 */
class Problem extends Error {
  name = 'Problem';
}

/**
 * Prints an error the way its kind deserves.
 *
 * @param {unknown} error
 */
function printError(error) {
  console.error(error instanceof Problem ? `\n${error.message}` : error);
}

module.exports = { Problem, printError };
