import { describe, expect, it } from "vitest";
import { readSettings, SettingsError } from "#src/lib/settings.ts";

const refusal = (environment: Record<string, string>): string => {
  try {
    readSettings(environment);
  } catch (error) {
    if (error instanceof SettingsError) return error.message;
    throw error;
  }
  return "accepted";
};

describe("settings", () => {
  it("are all optional", () => {
    expect(readSettings({})).toEqual({
      port: 4321,
      host: "127.0.0.1",
      publicUrl: "http://localhost:4321",
      databaseUrl: "file:var/rimelight.db",
      trustProxy: null,
      limitsFactor: 1,
      logLevel: "info",
    });
  });

  it("count as not set where they are empty", () => {
    expect(readSettings({ PORT: "", PUBLIC_URL: "", TRUST_PROXY: "" })).toEqual(readSettings({}));
  });

  it("are read into their types", () => {
    const settings = readSettings({
      PORT: "8080",
      HOST: "0.0.0.0",
      PUBLIC_URL: "https://Rimelight.example/",
      DATABASE_URL: "libsql://db.example",
      TRUST_PROXY: "10.0.0.0/8, fd00::/8",
      LOG_LEVEL: "warn",
    });
    expect(settings).toMatchObject({ port: 8080, publicUrl: "https://rimelight.example", logLevel: "warn" });
    expect(settings.trustProxy).toEqual({ ranges: ["10.0.0.0/8", "fd00::/8"] });
    expect(readSettings({ TRUST_PROXY: "2" }).trustProxy).toEqual({ hops: 2 });
  });

  it.each([
    [{ PORT: "0" }, /PORT must be a whole number/],
    [{ PORT: "70000" }, /PORT must be a whole number/],
    [{ PORT: "4321; rm" }, /PORT must be a whole number/],
    [{ HOST: "a b" }, /HOST must be an address/],
    [{ PUBLIC_URL: "rimelight.example" }, /PUBLIC_URL must be the address people type/],
    [{ PUBLIC_URL: "ftp://rimelight.example" }, /PUBLIC_URL must be/],
    [{ PUBLIC_URL: "https://rimelight.example/app" }, /PUBLIC_URL must be/],
    [{ PUBLIC_URL: "https://a:b@rimelight.example" }, /PUBLIC_URL must be/],
    [{ DATABASE_URL: "rimelight.db" }, /DATABASE_URL must be a file/],
    [{ DATABASE_URL: "file::memory:" }, /DATABASE_URL must name a file/],
    [{ TRUST_PROXY: "yes" }, /TRUST_PROXY must be the number of proxies/],
    [{ TRUST_PROXY: "0" }, /TRUST_PROXY must be/],
    [{ LIMITS_FACTOR: "0" }, /LIMITS_FACTOR must be a number above 0/],
    [{ LIMITS_FACTOR: "many" }, /LIMITS_FACTOR must be a number above 0/],
    [{ LIMITS_FACTOR: "10", HOST: "0.0.0.0" }, /LIMITS_FACTOR may differ from 1 only while HOST is a loopback/],
    [{ LOG_LEVEL: "loud" }, /LOG_LEVEL must be one of fatal, error/],
  ])("refuse %o with a sentence that names the setting and what it accepts", (environment, sentence) => {
    expect(refusal(environment)).toMatch(sentence);
  });

  it("name every one that cannot be used, and repeat no value", () => {
    const message = refusal({ PORT: "secret-1", PUBLIC_URL: "secret-2" });
    expect(message.split("\n")).toHaveLength(2);
    expect(message).not.toContain("secret");
  });
});
