import { CRUISE_OPTIONS, IMPORT_RULES } from "./tests/architecture/import-rules.mjs";

export default {
  forbidden: IMPORT_RULES,
  options: { ...CRUISE_OPTIONS, tsConfig: { fileName: "tsconfig.json" } },
};
