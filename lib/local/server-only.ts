// Scripts and the worker run outside the framework, where the marker package would throw on import.
export {};
