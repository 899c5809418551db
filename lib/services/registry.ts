import "server-only";
import { addNote, assignTechnician, authorizeDiagnosis, editIntake, movePromise } from "./cases/intake";
import { openCase } from "./cases/open";
import { advanceCase, parkCase, sendBack, unparkCase, waiveProof } from "./cases/stage";
import { markCause, recordTest, undoTest, unmarkCause } from "./causes/causes";
import { saveCustomer, saveVehicle } from "./customers/save";
import { describeFile, processFile, registerFile } from "./files/files";
import { closeCase, recordPayment, releaseCase } from "./papers/close";
import { saveOperation, savePart, saveRate, saveSetJob } from "./prices/save";
import { answerQuestion, askQuestion, giveApproval, recordApproval } from "./quotes/approve";
import { addQuoteJob, addSetJob, removeQuoteJob, saveDraft, saveQuoteJob } from "./quotes/draft";
import { sendQuote, withdrawQuote } from "./quotes/send";
import { addCode, importReadings, removeCode, setReadiness } from "./readings/codes";
import { addSample, describeSample, removeSample, setReadings } from "./readings/samples";
import { saveSettings } from "./shops/settings";
import type { Verb } from "./verb";
import { clockOff, clockOn, correctClock } from "./work/clock";
import { finishJob, removePart, setPart, strikeJob, usePart } from "./work/jobs";

const ALL = [
  openCase,
  editIntake,
  authorizeDiagnosis,
  assignTechnician,
  movePromise,
  addNote,
  advanceCase,
  sendBack,
  parkCase,
  unparkCase,
  waiveProof,
  addSample,
  setReadings,
  describeSample,
  removeSample,
  addCode,
  removeCode,
  setReadiness,
  importReadings,
  recordTest,
  undoTest,
  markCause,
  unmarkCause,
  saveDraft,
  addQuoteJob,
  addSetJob,
  saveQuoteJob,
  removeQuoteJob,
  sendQuote,
  withdrawQuote,
  giveApproval,
  recordApproval,
  askQuestion,
  answerQuestion,
  clockOn,
  clockOff,
  correctClock,
  usePart,
  setPart,
  removePart,
  finishJob,
  strikeJob,
  closeCase,
  releaseCase,
  recordPayment,
  saveCustomer,
  saveVehicle,
  saveRate,
  saveOperation,
  savePart,
  saveSetJob,
  saveSettings,
  registerFile,
  describeFile,
  processFile,
] as const;

/** Every write of the product by name; the API, the tests of who may do what, and the OpenAPI document read this list. */
export const VERBS: ReadonlyMap<string, Verb> = new Map(ALL.map((verb) => [verb.name, verb as unknown as Verb]));
