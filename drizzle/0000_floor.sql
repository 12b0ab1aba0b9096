CREATE TABLE `audit_log` (
	`id` text PRIMARY KEY NOT NULL,
	`actor_id` text NOT NULL,
	`action` text NOT NULL,
	`subject_kind` text NOT NULL,
	`subject_id` text NOT NULL,
	`detail` text NOT NULL,
	`created_at_ms` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `audit_log_subject` ON `audit_log` (`subject_kind`,`subject_id`);--> statement-breakpoint
CREATE TABLE `auth_session` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`expires_at` integer NOT NULL,
	`absolute_end_ms` integer NOT NULL,
	`created_at_ms` integer NOT NULL,
	`device` text NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `auth_session_user` ON `auth_session` (`user_id`);--> statement-breakpoint
CREATE TABLE `email_token` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`purpose` text NOT NULL,
	`email` text NOT NULL,
	`expires_at_ms` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `email_token_user` ON `email_token` (`user_id`,`purpose`);--> statement-breakpoint
CREATE TABLE `gear_span` (
	`id` text PRIMARY KEY NOT NULL,
	`session_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`setup_id` text NOT NULL,
	`start_ms` integer NOT NULL,
	`end_ms` integer NOT NULL,
	FOREIGN KEY (`session_id`) REFERENCES `session`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`setup_id`) REFERENCES `setup`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `gear_span_session` ON `gear_span` (`session_id`,`start_ms`);--> statement-breakpoint
CREATE INDEX `gear_span_setup` ON `gear_span` (`setup_id`);--> statement-breakpoint
CREATE INDEX `gear_span_owner` ON `gear_span` (`owner_id`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`recipient` text NOT NULL,
	`subject` text NOT NULL,
	`body` text NOT NULL,
	`sent_at_ms` integer,
	`attempts` integer DEFAULT 0 NOT NULL,
	`created_at_ms` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `part` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`kind` text NOT NULL,
	`maker` text NOT NULL,
	`model` text NOT NULL,
	`dimensions` text NOT NULL,
	`notes` text DEFAULT '' NOT NULL,
	`retired_at_ms` integer,
	`created_at_ms` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `part_owner` ON `part` (`owner_id`,`kind`);--> statement-breakpoint
CREATE TABLE `place` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`name` text NOT NULL,
	`lat_deg` real NOT NULL,
	`lon_deg` real NOT NULL,
	`created_at_ms` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `place_owner` ON `place` (`owner_id`);--> statement-breakpoint
CREATE TABLE `session_figures` (
	`session_id` text NOT NULL,
	`span_id` text NOT NULL,
	`owner_id` text NOT NULL,
	`setup_id` text,
	`start_ms` integer NOT NULL,
	`discipline` text NOT NULL,
	`elapsed_s` real NOT NULL,
	`water_distance_m` real NOT NULL,
	`on_foil_distance_m` real NOT NULL,
	`on_foil_time_s` real NOT NULL,
	`on_foil_share` real NOT NULL,
	`takeoffs` integer NOT NULL,
	`longest_segment_m` real NOT NULL,
	`bump_riding_speed_mps` real,
	`bump_rides` integer,
	`glide_ratio` real,
	`best_2s_mps` real,
	`best_10s_mps` real,
	`best_500m_mps` real,
	`best_nm_mps` real,
	`figures` text NOT NULL,
	PRIMARY KEY(`session_id`, `span_id`),
	FOREIGN KEY (`session_id`) REFERENCES `session`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `session_figures_owner_start` ON `session_figures` (`owner_id`,`span_id`,`start_ms`);--> statement-breakpoint
CREATE INDEX `session_figures_setup` ON `session_figures` (`setup_id`);--> statement-breakpoint
CREATE TABLE `session` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`upload_id` text NOT NULL,
	`entry_name` text DEFAULT '' NOT NULL,
	`format` text NOT NULL,
	`title` text NOT NULL,
	`title_is_own` integer DEFAULT false NOT NULL,
	`spot` text DEFAULT '' NOT NULL,
	`discipline` text NOT NULL,
	`time_zone` text NOT NULL,
	`start_ms` integer NOT NULL,
	`end_ms` integer NOT NULL,
	`trim_start_ms` integer,
	`trim_end_ms` integer,
	`wind_from_deg` real,
	`wind_speed_mps` real,
	`wave_period_s` real,
	`wave_height_m` real,
	`water` text,
	`notes` text DEFAULT '' NOT NULL,
	`visibility` text DEFAULT 'only_me' NOT NULL,
	`quality_grade` text NOT NULL,
	`analysis_version` integer NOT NULL,
	`deleted_at_ms` integer,
	`created_at_ms` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`upload_id`) REFERENCES `upload`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `session_owner_start` ON `session` (`owner_id`,`start_ms`);--> statement-breakpoint
CREATE INDEX `session_upload` ON `session` (`upload_id`);--> statement-breakpoint
CREATE TABLE `setup` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`name` text NOT NULL,
	`front_wing_id` text,
	`rear_wing_id` text,
	`fuselage_id` text,
	`mast_id` text,
	`board_id` text,
	`hand_wing_id` text,
	`shim_set_id` text,
	`mast_position_mm` real,
	`shim_stack_deg` real DEFAULT 0 NOT NULL,
	`copied_from_id` text,
	`notes` text DEFAULT '' NOT NULL,
	`retired_at_ms` integer,
	`created_at_ms` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`front_wing_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`rear_wing_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`fuselage_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`mast_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`board_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`hand_wing_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`shim_set_id`) REFERENCES `part`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `setup_owner` ON `setup` (`owner_id`);--> statement-breakpoint
CREATE INDEX `setup_front_wing` ON `setup` (`front_wing_id`);--> statement-breakpoint
CREATE INDEX `setup_rear_wing` ON `setup` (`rear_wing_id`);--> statement-breakpoint
CREATE TABLE `throttle` (
	`key` text PRIMARY KEY NOT NULL,
	`count` integer NOT NULL,
	`window_start_ms` integer NOT NULL,
	`blocked_until_ms` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `track` (
	`session_id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`series` blob NOT NULL,
	`segments` text NOT NULL,
	`bump_rides` text NOT NULL,
	`lulls` text NOT NULL,
	`quality` text NOT NULL,
	`window_start_ms` integer NOT NULL,
	`window_end_ms` integer NOT NULL,
	`first_fix_ms` integer NOT NULL,
	`last_fix_ms` integer NOT NULL,
	FOREIGN KEY (`session_id`) REFERENCES `session`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE TABLE `upload` (
	`id` text PRIMARY KEY NOT NULL,
	`owner_id` text NOT NULL,
	`sha256` text NOT NULL,
	`size_bytes` integer NOT NULL,
	`file_name` text NOT NULL,
	`status` text NOT NULL,
	`verdicts` text NOT NULL,
	`created_at_ms` integer NOT NULL,
	FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `upload_owner_sha256` ON `upload` (`owner_id`,`sha256`);--> statement-breakpoint
CREATE INDEX `upload_owner_created` ON `upload` (`owner_id`,`created_at_ms`);--> statement-breakpoint
CREATE TABLE `user` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`email_confirmed_at_ms` integer,
	`password_hash` text NOT NULL,
	`name` text NOT NULL,
	`weight_kg` real,
	`speed_unit` text DEFAULT 'kn' NOT NULL,
	`distance_unit` text DEFAULT 'km' NOT NULL,
	`theme` text DEFAULT 'system' NOT NULL,
	`created_at_ms` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `user_email_unique` ON `user` (`email`);