export * from "./audit";
export * from "./auth";
export * from "./cases";
export * from "./prices";
export * from "./quotes";
export * from "./shops";
