/// <reference types="astro/client" />

declare namespace App {
  interface Locals {
    /** Made by the front server for every request; shown in problems and logs. */
    requestId: string;
    /** The one trusted address of the caller, decided by the front server. */
    clientAddress: string;
  }
}
