CREATE TABLE `cellars` (
	`id` text PRIMARY KEY NOT NULL,
	`slug` text NOT NULL,
	`name` text NOT NULL,
	`time_zone` text NOT NULL,
	`drink` text NOT NULL,
	`is_demo` integer DEFAULT false NOT NULL,
	`created_at` integer NOT NULL,
	`version` integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `cellars_slug_idx` ON `cellars` (`slug`);--> statement-breakpoint
CREATE TABLE `membership_roles` (
	`cellar_id` text NOT NULL,
	`user_id` text NOT NULL,
	`role` text NOT NULL,
	PRIMARY KEY(`cellar_id`, `user_id`, `role`),
	FOREIGN KEY (`cellar_id`,`user_id`) REFERENCES `memberships`(`cellar_id`,`user_id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `memberships` (
	`cellar_id` text NOT NULL,
	`user_id` text NOT NULL,
	`created_at` integer NOT NULL,
	`ended_at` integer,
	PRIMARY KEY(`cellar_id`, `user_id`),
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `memberships_user_id_idx` ON `memberships` (`user_id`);--> statement-breakpoint
CREATE TABLE `one_time_links` (
	`id` text PRIMARY KEY NOT NULL,
	`purpose` text NOT NULL,
	`token_hash` text NOT NULL,
	`user_id` text,
	`seat_id` text,
	`created_by` text,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`used_at` integer,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `one_time_links_token_hash_idx` ON `one_time_links` (`token_hash`);--> statement-breakpoint
CREATE TABLE `sign_ins` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`created_at` integer NOT NULL,
	`last_seen_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`ended_at` integer,
	`user_agent` text NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `sign_ins_user_id_idx` ON `sign_ins` (`user_id`);--> statement-breakpoint
CREATE TABLE `users` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`password_hash` text,
	`created_at` integer NOT NULL,
	`disabled_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `users_email_idx` ON `users` (`email`);--> statement-breakpoint
CREATE TABLE `fills` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`vessel_id` text NOT NULL,
	`lot_id` text NOT NULL,
	`from_day` text NOT NULL,
	`to_day` text,
	`note` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`vessel_id`) REFERENCES `vessels`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`lot_id`) REFERENCES `lots`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "fills_days_check" CHECK("fills"."to_day" IS NULL OR "fills"."to_day" >= "fills"."from_day")
);
--> statement-breakpoint
CREATE INDEX `fills_vessel_id_idx` ON `fills` (`vessel_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `fills_cellar_id_id` ON `fills` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `lots` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`code` text NOT NULL,
	`name` text NOT NULL,
	`drink` text NOT NULL,
	`vintage` integer,
	`note` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`archived_at` integer,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `lots_cellar_id_code_idx` ON `lots` (`cellar_id`,`code`);--> statement-breakpoint
CREATE UNIQUE INDEX `lots_cellar_id_id` ON `lots` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `pulls` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`fill_id` text NOT NULL,
	`pulled_at` integer NOT NULL,
	`pulled_by` text NOT NULL,
	`draw_method` text NOT NULL,
	`volume_ml` integer NOT NULL,
	`temperature_c` real,
	`is_sanitised` integer NOT NULL,
	`evaporation_s` integer NOT NULL,
	`is_vented` integer NOT NULL,
	`is_hiss_heard` integer,
	`is_resealed` integer NOT NULL,
	`is_topped_up` integer NOT NULL,
	`topped_with` text DEFAULT '' NOT NULL,
	`is_wiped` integer NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`archived_at` integer,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`pulled_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`fill_id`) REFERENCES `fills`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "pulls_volume_ml_check" CHECK("pulls"."volume_ml" > 0)
);
--> statement-breakpoint
CREATE INDEX `pulls_cellar_id_pulled_at_idx` ON `pulls` (`cellar_id`,`pulled_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `pulls_cellar_id_id` ON `pulls` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `vessels` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`name` text NOT NULL,
	`kind` text NOT NULL,
	`volume_l` real NOT NULL,
	`cooper` text DEFAULT '' NOT NULL,
	`wood_species` text DEFAULT '' NOT NULL,
	`wood_origin` text DEFAULT '' NOT NULL,
	`grain` text,
	`toast` text,
	`year` integer,
	`location` text DEFAULT '' NOT NULL,
	`note` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	`archived_at` integer,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "vessels_volume_l_check" CHECK("vessels"."volume_l" > 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `vessels_cellar_id_name_idx` ON `vessels` (`cellar_id`,`name`);--> statement-breakpoint
CREATE UNIQUE INDEX `vessels_cellar_id_id` ON `vessels` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `descriptors` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`key` text NOT NULL,
	`sense` text NOT NULL,
	`family` text NOT NULL,
	`name` text NOT NULL,
	`definition` text NOT NULL,
	`reference` text DEFAULT '' NOT NULL,
	`phase` text NOT NULL,
	`low_anchor` text NOT NULL,
	`high_anchor` text NOT NULL,
	`created_at` integer NOT NULL,
	`archived_at` integer,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `descriptors_cellar_id_key_idx` ON `descriptors` (`cellar_id`,`key`);--> statement-breakpoint
CREATE UNIQUE INDEX `descriptors_cellar_id_id` ON `descriptors` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `ballot_items` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`position` integer NOT NULL,
	`phase` text NOT NULL,
	`kind` text NOT NULL,
	`descriptor_id` text NOT NULL,
	`name` text NOT NULL,
	`definition` text NOT NULL,
	`low_anchor` text NOT NULL,
	`high_anchor` text NOT NULL,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`descriptor_id`) REFERENCES `descriptors`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `ballot_items_session_id_position_idx` ON `ballot_items` (`session_id`,`position`);--> statement-breakpoint
CREATE UNIQUE INDEX `ballot_items_session_id_descriptor_id_phase_idx` ON `ballot_items` (`session_id`,`descriptor_id`,`phase`);--> statement-breakpoint
CREATE TABLE `sample_components` (
	`cellar_id` text NOT NULL,
	`sample_id` text NOT NULL,
	`pull_id` text NOT NULL,
	`share` real NOT NULL,
	PRIMARY KEY(`sample_id`, `pull_id`),
	FOREIGN KEY (`cellar_id`,`sample_id`) REFERENCES `samples`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`pull_id`) REFERENCES `pulls`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sample_components_share_check" CHECK("sample_components"."share" > 0 AND "sample_components"."share" <= 1)
);
--> statement-breakpoint
CREATE TABLE `samples` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`label` text NOT NULL,
	`is_control` integer DEFAULT false NOT NULL,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `samples_session_id_ordinal_idx` ON `samples` (`session_id`,`ordinal`);--> statement-breakpoint
CREATE UNIQUE INDEX `samples_cellar_id_id` ON `samples` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `seat_people` (
	`seat_id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`display_name` text NOT NULL,
	`user_id` text,
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`seat_id`) REFERENCES `seats`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `seats` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`number` integer NOT NULL,
	`is_reserve` integer NOT NULL,
	`token_generation` integer DEFAULT 0 NOT NULL,
	`claimed_at` integer,
	`seat_role` text,
	`consented_at` integer,
	`submitted_at` integer,
	`left_at` integer,
	`last_heard_at` integer,
	`at_block` integer,
	`at_position` integer,
	`at_phase` text,
	`on_phone` integer DEFAULT 0 NOT NULL,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `seats_session_id_number_idx` ON `seats` (`session_id`,`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `seats_cellar_id_id` ON `seats` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `servings` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`seat_id` text NOT NULL,
	`block` integer NOT NULL,
	`position` integer NOT NULL,
	`code` text NOT NULL,
	FOREIGN KEY (`cellar_id`,`seat_id`) REFERENCES `seats`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `servings_seat_id_block_position_idx` ON `servings` (`seat_id`,`block`,`position`);--> statement-breakpoint
CREATE UNIQUE INDEX `servings_seat_id_code_idx` ON `servings` (`seat_id`,`code`);--> statement-breakpoint
CREATE INDEX `servings_session_id_idx` ON `servings` (`session_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `servings_cellar_id_id` ON `servings` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `session_pourers` (
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`user_id` text NOT NULL,
	PRIMARY KEY(`session_id`, `user_id`),
	FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`state` text NOT NULL,
	`method` text NOT NULL,
	`title` text NOT NULL,
	`instruction` text NOT NULL,
	`private_question` text NOT NULL,
	`leader_id` text NOT NULL,
	`scheduled_for` integer,
	`seats_planned` integer NOT NULL,
	`reserves_planned` integer NOT NULL,
	`replicates` integer NOT NULL,
	`alpha` real NOT NULL,
	`serving_temperature_c` real,
	`serving_volume_ml` integer NOT NULL,
	`rest_s` integer NOT NULL,
	`allergens` text NOT NULL,
	`join_code` text,
	`join_key` text,
	`created_at` integer NOT NULL,
	`sealed_at` integer,
	`opened_at` integer,
	`closed_at` integer,
	`unsealed_at` integer,
	`abandoned_at` integer,
	`abandon_reason` text,
	`close_reason` text,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`leader_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sessions_replicates_check" CHECK("sessions"."replicates" BETWEEN 1 AND 12),
	CONSTRAINT "sessions_seats_check" CHECK("sessions"."seats_planned" BETWEEN 1 AND 200)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_join_code_idx` ON `sessions` (`join_code`);--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_join_key_idx` ON `sessions` (`join_key`);--> statement-breakpoint
CREATE INDEX `sessions_cellar_id_created_at_idx` ON `sessions` (`cellar_id`,`created_at`);--> statement-breakpoint
CREATE UNIQUE INDEX `sessions_cellar_id_id` ON `sessions` (`cellar_id`,`id`);--> statement-breakpoint
CREATE TABLE `audit_events` (
	`cellar_id` text NOT NULL,
	`seq` integer NOT NULL,
	`at` integer NOT NULL,
	`actor_user_id` text,
	`actor_seat_id` text,
	`action` text NOT NULL,
	`session_id` text,
	`subject_type` text NOT NULL,
	`subject_id` text NOT NULL,
	`detail` text NOT NULL,
	`is_blinding` integer DEFAULT false NOT NULL,
	`previous_hash` text NOT NULL,
	`hash` text NOT NULL,
	PRIMARY KEY(`cellar_id`, `seq`),
	FOREIGN KEY (`cellar_id`) REFERENCES `cellars`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`actor_user_id`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `audit_events_session_id_idx` ON `audit_events` (`session_id`);--> statement-breakpoint
CREATE TABLE `early_openings` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`code` text,
	`reason` text NOT NULL,
	`requested_by` text NOT NULL,
	`requested_at` integer NOT NULL,
	`approved_by` text,
	`approved_at` integer,
	`refused_at` integer,
	FOREIGN KEY (`requested_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`approved_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `operations` (
	`receipt_no` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`op_id` text NOT NULL,
	`cellar_id` text NOT NULL,
	`session_id` text NOT NULL,
	`seat_id` text NOT NULL,
	`token_generation` integer NOT NULL,
	`device_id` text NOT NULL,
	`seq` integer NOT NULL,
	`kind` text NOT NULL,
	`block` integer,
	`position` integer,
	`item` integer,
	`value_number` real,
	`value_text` text,
	`is_guess` integer,
	`body_hash` text NOT NULL,
	`client_at` integer NOT NULL,
	`received_at` integer NOT NULL,
	`admission` text NOT NULL,
	FOREIGN KEY (`cellar_id`,`seat_id`) REFERENCES `seats`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "operations_score_check" CHECK("operations"."kind" <> 'score' OR ("operations"."value_number" BETWEEN 0 AND 100))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `operations_op_id_idx` ON `operations` (`op_id`);--> statement-breakpoint
CREATE INDEX `operations_seat_id_idx` ON `operations` (`seat_id`);--> statement-breakpoint
CREATE INDEX `operations_session_id_idx` ON `operations` (`session_id`);--> statement-breakpoint
CREATE TABLE `seals` (
	`session_id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`ciphertext` blob NOT NULL,
	`nonce` blob NOT NULL,
	`tag` blob NOT NULL,
	`commitment` text NOT NULL,
	`sealed_at` integer NOT NULL,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `seals_commitment_idx` ON `seals` (`commitment`);--> statement-breakpoint
CREATE TABLE `serving_samples` (
	`serving_id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`sample_id` text NOT NULL,
	FOREIGN KEY (`cellar_id`,`serving_id`) REFERENCES `servings`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`sample_id`) REFERENCES `samples`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `serving_samples_sample_id_idx` ON `serving_samples` (`sample_id`);--> statement-breakpoint
CREATE TABLE `calls` (
	`id` text PRIMARY KEY NOT NULL,
	`cellar_id` text NOT NULL,
	`fill_id` text NOT NULL,
	`session_id` text,
	`kind` text NOT NULL,
	`reasons` text NOT NULL,
	`next_day` text,
	`decided_by` text NOT NULL,
	`decided_at` integer NOT NULL,
	`withdrawn_at` integer,
	`withdrawn_by` text,
	`withdraw_reason` text,
	FOREIGN KEY (`decided_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`withdrawn_by`) REFERENCES `users`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`fill_id`) REFERENCES `fills`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`cellar_id`,`session_id`) REFERENCES `sessions`(`cellar_id`,`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `calls_fill_id_idx` ON `calls` (`fill_id`);