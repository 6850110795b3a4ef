CREATE TABLE `elements` (
	`atomic_number` integer PRIMARY KEY NOT NULL,
	`symbol` text NOT NULL,
	`name` text NOT NULL,
	`standard_atomic_weight` real NOT NULL,
	`weight_is_mass_number` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `elements_symbol_unique` ON `elements` (`symbol`);--> statement-breakpoint
CREATE TABLE `factors` (
	`version_id` integer NOT NULL,
	`tabulation` text NOT NULL,
	`atomic_number` integer NOT NULL,
	`energy_ev` real NOT NULL,
	`side` text NOT NULL,
	`f1` real,
	`f2` real,
	`coherent_barn` real,
	`incoherent_barn` real,
	`energy_absorption_barn` real,
	PRIMARY KEY(`version_id`, `tabulation`, `atomic_number`, `energy_ev`, `side`),
	FOREIGN KEY (`version_id`) REFERENCES `table_versions`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "factors_side" CHECK("factors"."side" IN ('', 'below', 'above'))
) WITHOUT ROWID;
--> statement-breakpoint
CREATE TABLE `lines` (
	`version_id` integer NOT NULL,
	`atomic_number` integer NOT NULL,
	`shell` text NOT NULL,
	`line` text NOT NULL,
	`energy_ev` real NOT NULL,
	`rate` real NOT NULL,
	PRIMARY KEY(`version_id`, `atomic_number`, `shell`, `line`),
	FOREIGN KEY (`version_id`) REFERENCES `table_versions`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `shells` (
	`version_id` integer NOT NULL,
	`atomic_number` integer NOT NULL,
	`shell` text NOT NULL,
	`edge_energy_ev` real NOT NULL,
	`fluorescence_yield` real,
	PRIMARY KEY(`version_id`, `atomic_number`, `shell`),
	FOREIGN KEY (`version_id`) REFERENCES `table_versions`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `table_versions` (
	`id` integer PRIMARY KEY NOT NULL,
	`version` text NOT NULL,
	`manifest_sha256` text NOT NULL,
	`manifest` text NOT NULL,
	`content_sha256` text NOT NULL,
	`seeded_at` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `table_versions_version_unique` ON `table_versions` (`version`);