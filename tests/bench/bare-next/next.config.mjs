/** The yardstick: the framework with nothing of ours in it. */
export default { serverExternalPackages: ["better-sqlite3"], poweredByHeader: false };
