const { createContext, constants } = require('node:vm');
const { TestEnvironment } = require('jest-environment-node');

/**
 * Jest gives each test file a context whose globals are looked up through a proxy. Loops that name `Math`,
 * `Infinity` or typed arrays millions of times ran up to ten times slower there than in the server; this
 * context has plain globals.
 */
module.exports = class QuickEnvironment extends TestEnvironment {
  constructor(config, context) {
    super(config, context);
    const quick = createContext(constants.DONT_CONTEXTIFY);
    const own = new Set(Object.getOwnPropertyNames(quick));
    for (const [name, descriptor] of Object.entries(Object.getOwnPropertyDescriptors(this.global))) {
      if (!own.has(name)) Object.defineProperty(quick, name, descriptor);
    }
    const { Buffer, ArrayBuffer, Uint8Array } = globalThis;
    Object.assign(quick, { global: quick, Buffer, ArrayBuffer, Uint8Array });
    this.context = this.global = quick;
    this.moduleMocker = new this.moduleMocker.constructor(quick);
    this.fakeTimersModern = new this.fakeTimersModern.constructor({
      config: config.projectConfig,
      global: quick,
    });
  }
};
