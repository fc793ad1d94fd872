import { describe, expect, it } from "vitest";
import { stackOwner } from "../../../kernel-ext/kernel/controlThread";

describe("stackOwner", () => {
  const stack = (...frames: string[]) =>
    ["Error", "    at evaluate:1:1", ...frames.map((one) => `    at ${one}`)].join("\n");

  it("finds the user's code below Node's, and code of packages that the user called", () => {
    expect(stackOwner(stack("cell[3]:2:5", "Script.runInThisContext (node:vm:137:12)"))).toBe("user");
    expect(stackOwner(stack("listOnTimeout (node:internal/timers:581:17)", "f (/home/x/dist/cosmo/a.js:1:2)"))).toBe(
      "user",
    );
    expect(stackOwner(stack("async Promise.all (index 0)", "async cell[12]:1:9"))).toBe("user");
  });

  it("knows the kernel's own code and Node's", () => {
    expect(
      stackOwner(
        stack("Kernel.publish (/p/dist/kernel-ext/kernel/kernel.js:40:3)", "process.x (node:internal/process:1:1)"),
      ),
    ).toBe("kernel");
  });

  it("finds nobody between two microtasks", () => {
    expect(stackOwner(stack())).toBe("nobody");
    expect(stackOwner("")).toBe("nobody");
  });
});
