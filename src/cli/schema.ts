/** `layshaft schema`: the JSON Schema of study files, for editors. */
import { studyJsonSchema } from '../core/study/schema.ts';
import { type CommandRow, exitStatus } from './command.ts';
import { giveJson } from './terminal.ts';

/** The row of `schema`. */
export const schemaCommand: CommandRow = {
  name: 'schema',
  sentence: 'Prints the JSON Schema of study files, for editors',
  about: [
    'Editors that know YAML complete names and show what each means when they are given the schema: save it with layshaft schema > layshaft.schema.json and put this line at the top of the study: # yaml-language-server: $schema=layshaft.schema.json',
  ],
  arguments: [],
  options: [],
  example: 'layshaft schema',
  act: async () => {
    giveJson(studyJsonSchema());
    return exitStatus.done;
  },
};
