import { openTestLaboratory, type TestLaboratory } from "../support/test-laboratory";
import { printFigure } from "./figure";

/**
 * Real time that the engine spends on a point whose policy waits for nothing, in virtual time so that the bench's own
 * waits cost none: ports, planning, judgement and journal. Beside it the time of the same exchanges alone.
 */
export async function measureEngineOverhead(): Promise<void> {
  const laboratory = await openTestLaboratory();
  try {
    const nominalOhms = Array.from({ length: 20 }, (_, index) => (index + 1) * 1e6).filter(
      (value) => value <= 9e6 || value % 1e7 === 0,
    );
    const recipe = await laboratory.addRecipe({
      nominalOhms,
      testVolts: [50, 100, 250, 500, 1000],
      settling: { kind: "fixed", waitSeconds: 0 },
      readingsPerPoint: 1,
    });
    await laboratory.manager.devices.reopen();
    const points = nominalOhms.length * 5;
    const before = exchanges(laboratory);
    const from = performance.now();
    await laboratory.start(recipe, "TW-0398");
    await laboratory.manager.settled();
    const perPointMs = (performance.now() - from) / points;
    const exchangesPerPoint = (exchanges(laboratory) - before) / points;
    const exchangeMs = await bareExchangeMs(laboratory);
    printFigure("engine_overhead_per_point", perPointMs, "ms");
    printFigure("exchanges_per_point", exchangesPerPoint, "exchanges");
    printFigure("bare_port_time_per_point", exchangesPerPoint * exchangeMs, "ms");
  } finally {
    await laboratory.close();
  }
}

function exchanges({ simulated }: TestLaboratory): number {
  return simulated.linesReceived;
}

async function bareExchangeMs({ manager }: TestLaboratory): Promise<number> {
  const count = 2000;
  const from = performance.now();
  for (let index = 0; index < count; index += 1) await manager.devices.meter.readVolts();
  return (performance.now() - from) / count;
}
