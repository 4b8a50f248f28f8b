/** Nothing; without a file of its own the bare application would take the one of the program around it. */
export function register() {}
