import { readJson, signedInRoute } from '@/lib/access/route';
import { calculate, engineProblem } from '@/lib/calculations/commands';
import { EngineError } from '@/lib/engine/contract';

/** One calculation: the same body and answer as the command line, with the web's limits. */
export const POST = signedInRoute<{ name: string }>({
  name: 'engine.calculate',
  run: async ({ params, request, json }) => {
    try {
      return json(await calculate(params.name, await readJson(request)));
    } catch (error) {
      if (error instanceof EngineError) return engineProblem(error);
      throw error;
    }
  },
});
