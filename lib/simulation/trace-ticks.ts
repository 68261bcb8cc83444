import { amt, amtStride, buf, bufStride, sta, staStride, type Model } from "./model";
import type { State } from "./state";
import { type BufferTrace, type StationTrace, stationStates } from "./trace-types";

const working = stationStates.indexOf("working");
const short = stationStates.indexOf("short");
const noRoom = stationStates.indexOf("noRoom");
const stopped = stationStates.indexOf("stopped");

export type TickTrace = ReturnType<typeof createTickTrace>;

/** Looks at the levels and at every station after each tick; what a station lost in it is what its counts grew by. */
export function createTickTrace(model: Model, nWeeks: number) {
  const most = nWeeks * (model.ticksPerDay * model.daysPerWeek + model.overtimeTicks);
  const nStations = model.stations.length;
  const buffers = model.shape.buffers.map(({ id }): BufferTrace => ({
    id,
    startLevel: 0,
    levels: new Int32Array(most),
  }));
  const stations = model.shape.stations.map(({ id }): StationTrace => ({
    id,
    states: new Uint8Array(most),
    lacking: new Int16Array(most).fill(-1),
  }));
  const down = new Float64Array(nStations);
  const blocked = new Float64Array(nStations);
  const starved = new Float64Array(model.inputs.length / 2);
  let spent = emptyHours();

  function emptyHours(): number[][] {
    return model.shape.stations.map(() => stationStates.map(() => 0));
  }

  function noteStation(s: State, k: number, t: number): void {
    const am = k * amtStride;
    const { index } = model.stations[k];
    let state = working;
    let lost = 0;
    let lacking = -1;
    if (s.amounts[am + amt.down] > down[k]) {
      state = stopped;
      lost = 1;
    } else if (s.amounts[am + amt.blocked] > blocked[k]) {
      state = noRoom;
      lost = (s.amounts[am + amt.blocked] - blocked[k]) / s.amounts[am + amt.speed];
    } else {
      const end = s.stations[k * staStride + sta.inputsEnd];
      for (let i = s.stations[k * staStride + sta.inputs]; i < end; i += 2) {
        if (!(s.starved[i / 2] > starved[i / 2])) continue;
        state = short;
        lost = s.starved[i / 2] - starved[i / 2];
        lacking = s.inputs[i] / bufStride;
      }
    }
    const hours = model.shape.tickMinutes / 60;
    spent[index][state] += lost * hours;
    spent[index][working] += (1 - lost) * hours;
    if (lost <= 0.5) return;
    stations[index].states[t] = state;
    if (state === short) stations[index].lacking[t] = lacking;
  }

  return {
    count: 0,
    start(s: State): void {
      buffers.forEach((buffer, i) => (buffer.startLevel = s.buffers[i * bufStride + buf.level]));
    },
    /** Keeps the counts that stand before a tick. */
    remember(s: State): void {
      for (let k = 0; k < nStations; k++) {
        down[k] = s.amounts[k * amtStride + amt.down];
        blocked[k] = s.amounts[k * amtStride + amt.blocked];
      }
      starved.set(s.starved);
    },
    note(s: State): void {
      const t = this.count++;
      buffers.forEach(({ levels }, i) => (levels[t] = s.buffers[i * bufStride + buf.level]));
      for (let k = 0; k < nStations; k++) noteStation(s, k, t);
    },
    /** Hours of each station in each state since the last call, in document order. */
    takeHours(): number[][] {
      const taken = spent;
      spent = emptyHours();
      return taken;
    },
    cut(): { buffers: BufferTrace[]; stations: StationTrace[] } {
      return {
        buffers: buffers.map((one) => ({ ...one, levels: one.levels.slice(0, this.count) })),
        stations: stations.map(({ id, states, lacking }) => ({
          id,
          states: states.slice(0, this.count),
          lacking: lacking.slice(0, this.count),
        })),
      };
    },
  };
}
