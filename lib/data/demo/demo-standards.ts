import { decadeBoxSchema, type Decade, type DecadeBoxRecord } from "@/lib/schemas/instrument";
import { amperes, ohms, volts } from "@/lib/units/quantities";

const DAY_MS = 86_400_000;

interface DecadeGrade {
  stepOhms: number;
  uncertaintyPercent: number;
  temperaturePpm: number;
  voltagePpm: number;
  ratedAmperes: number;
  ratedWatts: number;
  /** Deviation of each position by certificate, in per cent of its value, from position 1 on. */
  deviationPercent: readonly number[];
}

const highGrades: readonly DecadeGrade[] = [
  {
    stepOhms: 10e9,
    uncertaintyPercent: 0.6,
    temperaturePpm: 220,
    voltagePpm: -1.6,
    ratedAmperes: 2e-6,
    ratedWatts: 0.1,
    deviationPercent: [-0.13, -0.09, 0.04, 0.11, -0.12, -0.07, 0.02, 0.09, -0.13],
  },
  {
    stepOhms: 1e9,
    uncertaintyPercent: 0.3,
    temperaturePpm: 120,
    voltagePpm: -0.9,
    ratedAmperes: 5e-6,
    ratedWatts: 0.1,
    deviationPercent: [0.06, -0.04, 0.03, 0.08, -0.12, 0.05, 0.01, -0.03, 0.04],
  },
  {
    stepOhms: 100e6,
    uncertaintyPercent: 0.12,
    temperaturePpm: 60,
    voltagePpm: -0.4,
    ratedAmperes: 2e-5,
    ratedWatts: 0.2,
    deviationPercent: [0.03, 0.02, -0.04, 0.01, 0.05, -0.02, 0.03, 0.02, -0.01],
  },
  {
    stepOhms: 10e6,
    uncertaintyPercent: 0.06,
    temperaturePpm: 25,
    voltagePpm: -0.2,
    ratedAmperes: 2e-4,
    ratedWatts: 0.5,
    deviationPercent: [0.02, -0.02, 0.01, 0.02, -0.03, 0.01, 0.0, 0.01, 0.02],
  },
  {
    stepOhms: 1e6,
    uncertaintyPercent: 0.03,
    temperaturePpm: 15,
    voltagePpm: -0.1,
    ratedAmperes: 2.5e-3,
    ratedWatts: 3,
    deviationPercent: [0.01, 0.01, -0.02, 0.01, 0.01, -0.01, 0.0, 0.01, 0.01],
  },
  {
    stepOhms: 100e3,
    uncertaintyPercent: 0.02,
    temperaturePpm: 10,
    voltagePpm: 0,
    ratedAmperes: 5e-3,
    ratedWatts: 3,
    deviationPercent: [0.01, -0.01, 0.01, 0.0, 0.01, 0.01, -0.01, 0.0, 0.01],
  },
  {
    stepOhms: 10e3,
    uncertaintyPercent: 0.02,
    temperaturePpm: 10,
    voltagePpm: 0,
    ratedAmperes: 1e-2,
    ratedWatts: 2,
    deviationPercent: [0.01, 0.0, 0.01, -0.01, 0.0, 0.01, 0.0, 0.01, 0.0],
  },
  {
    stepOhms: 1e3,
    uncertaintyPercent: 0.03,
    temperaturePpm: 15,
    voltagePpm: 0,
    ratedAmperes: 1e-2,
    ratedWatts: 1,
    deviationPercent: [0.02, 0.01, 0.0, 0.01, 0.01, 0.0, 0.01, 0.0, 0.01],
  },
];

const lowGrades: readonly DecadeGrade[] = [
  ...highGrades.slice(3).map((grade) => ({ ...grade, ratedWatts: 0.5 })),
  {
    stepOhms: 100,
    uncertaintyPercent: 0.1,
    temperaturePpm: 20,
    voltagePpm: 0,
    ratedAmperes: 2e-2,
    ratedWatts: 0.5,
    deviationPercent: [0.05, 0.02, 0.01, 0.02, 0.0, 0.01, 0.02, 0.01, 0.0],
  },
];

function decadeOf(grade: DecadeGrade, ratedVolts: number): Decade {
  const corrections = grade.deviationPercent.map((percent, index) => (percent / 100) * (index + 1) * grade.stepOhms);
  return {
    stepOhms: ohms(grade.stepOhms),
    highestPosition: 9,
    correctionsOhms: [0, ...corrections],
    uncertaintyPercent: grade.uncertaintyPercent,
    temperatureCoefficientPpmPerKelvin: grade.temperaturePpm,
    voltageCoefficientPpmPerVolt: grade.voltagePpm,
    ratedVolts: volts(ratedVolts),
    ratedAmperes: amperes(grade.ratedAmperes),
    ratedWatts: grade.ratedWatts,
  };
}

interface BoxData {
  id: string;
  model: string;
  name: string;
  serialNumber: string;
  ratedVolts: number;
  grades: readonly DecadeGrade[];
  residualOhms: number;
  certificate: string;
  dueInDays: number;
}

const boxes: readonly BoxData[] = [
  {
    id: "db-9-1",
    model: "DB-9",
    name: "Corvane DB-9 no. 1",
    serialNumber: "C9-2207",
    ratedVolts: 1250,
    grades: highGrades,
    residualOhms: 0.4,
    certificate: "TK-26-0418",
    dueInDays: 151,
  },
  {
    id: "db-9-2",
    model: "DB-9",
    name: "Corvane DB-9 no. 2",
    serialNumber: "C9-2211",
    ratedVolts: 1250,
    grades: highGrades,
    residualOhms: 0.5,
    certificate: "TK-25-1190",
    dueInDays: 11,
  },
  {
    id: "db-3",
    model: "DB-3",
    name: "Corvane DB-3",
    serialNumber: "C3-0914",
    ratedVolts: 250,
    grades: lowGrades,
    residualOhms: 0.2,
    certificate: "TK-26-0663",
    dueInDays: 230,
  },
];

/** The workshop's decade boxes; due dates lie as they do on the day the laboratory is laid. */
export function demoStandards(nowMs: number): DecadeBoxRecord[] {
  return boxes.map((box) =>
    decadeBoxSchema.parse({
      id: box.id,
      kind: "decade-box",
      maker: "Corvane",
      model: box.model,
      name: box.name,
      serialNumber: box.serialNumber,
      ratedVolts: box.ratedVolts,
      residualOhms: box.residualOhms,
      referenceCelsius: 23,
      decades: box.grades.map((grade) => decadeOf(grade, box.ratedVolts)),
      calibration: {
        certificate: box.certificate,
        calibratedOn: dateOf(nowMs + (box.dueInDays - 365) * DAY_MS),
        dueOn: dateOf(nowMs + box.dueInDays * DAY_MS),
      },
    }),
  );
}

function dateOf(atMs: number): string {
  return new Date(atMs).toISOString().slice(0, 10);
}
