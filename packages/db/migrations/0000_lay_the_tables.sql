CREATE TABLE "audit_event" (
	"firm_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"what" text NOT NULL,
	"subject" text NOT NULL,
	CONSTRAINT "audit_event_pkey" PRIMARY KEY("firm_id","id")
);
--> statement-breakpoint
CREATE TABLE "bus" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"order_key" text COLLATE "C" NOT NULL,
	"name" text,
	"kind" text NOT NULL,
	CONSTRAINT "bus_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "bus_code_check" CHECK (char_length("code") >= 1 and char_length("code") <= 80),
	CONSTRAINT "bus_order_key_check" CHECK (char_length("order_key") >= 1 and char_length("order_key") <= 64),
	CONSTRAINT "bus_name_check" CHECK (char_length("name") <= 400),
	CONSTRAINT "bus_kind_check" CHECK ("kind" in ('service', 'panel', 'junction', 'outlet', 'equipment'))
);
--> statement-breakpoint
CREATE TABLE "decision" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"delivery_id" uuid,
	"decision" text NOT NULL,
	"words" text NOT NULL,
	"comments" text NOT NULL,
	"name" text NOT NULL,
	"title" text NOT NULL,
	"via" text NOT NULL,
	"entered_by" uuid,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "decision_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "decision_decision_check" CHECK ("decision" in ('no-exceptions', 'corrections-needed', 'other')),
	CONSTRAINT "decision_via_check" CHECK ("via" in ('link', 'paper')),
	CONSTRAINT "decision_words_check" CHECK ("decision"."decision" <> 'other' or "decision"."words" <> ''),
	CONSTRAINT "decision_source_check" CHECK (("decision"."via" = 'link') = ("decision"."delivery_id" is not null)),
	CONSTRAINT "decision_entered_by_check" CHECK (("decision"."via" = 'paper') = ("decision"."entered_by" is not null))
);
--> statement-breakpoint
CREATE TABLE "delivery" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"recipient_name" text NOT NULL,
	"recipient_email" text NOT NULL,
	"message" text NOT NULL,
	"state" text NOT NULL,
	"message_id" text NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"last_error" text,
	"queued_by" uuid NOT NULL,
	"queued_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sending_at" timestamp with time zone,
	"sent_at" timestamp with time zone,
	"opened_at" timestamp with time zone,
	"epoch" integer DEFAULT 1 NOT NULL,
	"link_expires_at" timestamp with time zone NOT NULL,
	"link_revoked_at" timestamp with time zone,
	CONSTRAINT "delivery_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "delivery_state_check" CHECK ("state" in ('queued', 'sending', 'sent', 'failed', 'uncertain')),
	CONSTRAINT "delivery_epoch_check" CHECK ("delivery"."epoch" >= 1),
	CONSTRAINT "delivery_attempts_check" CHECK ("delivery"."attempts" >= 0)
);
--> statement-breakpoint
CREATE TABLE "link_index" (
	"hash" text PRIMARY KEY NOT NULL,
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"delivery_id" uuid NOT NULL,
	"epoch" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "job_edit" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"seq" integer NOT NULL,
	"edit_id" uuid NOT NULL,
	"person_id" uuid,
	"label" text NOT NULL,
	"ops" jsonb NOT NULL,
	"undoes" uuid,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "job_edit_pkey" PRIMARY KEY("firm_id","job_id","seq")
);
--> statement-breakpoint
CREATE TABLE "firm" (
	"firm_id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"report_heading" text DEFAULT '' NOT NULL,
	"notice_wording" text DEFAULT '' NOT NULL,
	"currency" text DEFAULT 'USD' NOT NULL,
	"length_unit" text DEFAULT 'ft' NOT NULL,
	"wire_unit" text DEFAULT 'awg' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "firm_name_check" CHECK (char_length("firm"."name") between 1 and 200),
	CONSTRAINT "firm_currency_check" CHECK ("firm"."currency" ~ '^[A-Z]{3}$'),
	CONSTRAINT "firm_length_unit_check" CHECK ("length_unit" in ('ft', 'm')),
	CONSTRAINT "firm_wire_unit_check" CHECK ("wire_unit" in ('awg', 'mm2'))
);
--> statement-breakpoint
CREATE TABLE "invitation" (
	"firm_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"email" text NOT NULL,
	"role" text NOT NULL,
	"invited_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"withdrawn_at" timestamp with time zone,
	CONSTRAINT "invitation_pkey" PRIMARY KEY("firm_id","id"),
	CONSTRAINT "invitation_role_check" CHECK ("role" in ('admin', 'contractor', 'estimator'))
);
--> statement-breakpoint
CREATE TABLE "membership" (
	"firm_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_pkey" PRIMARY KEY("firm_id","person_id"),
	CONSTRAINT "membership_role_check" CHECK ("role" in ('admin', 'contractor', 'estimator'))
);
--> statement-breakpoint
CREATE TABLE "conductor_row" (
	"firm_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"material" text NOT NULL,
	"area_mm2" text NOT NULL,
	"r" text NOT NULL,
	"x" text NOT NULL,
	"per" text NOT NULL,
	"temperature" text NOT NULL,
	"ampacity" text,
	"source" text NOT NULL,
	CONSTRAINT "conductor_row_pkey" PRIMARY KEY("firm_id","id"),
	CONSTRAINT "conductor_row_name_check" CHECK (char_length("name") >= 1 and char_length("name") <= 80),
	CONSTRAINT "conductor_row_material_check" CHECK ("material" in ('copper', 'aluminum')),
	CONSTRAINT "conductor_row_area_mm2_check" CHECK ("area_mm2" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "conductor_row_r_check" CHECK ("r" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "conductor_row_x_check" CHECK ("x" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "conductor_row_per_check" CHECK ("per" in ('1000ft', 'km')),
	CONSTRAINT "conductor_row_temperature_check" CHECK ("temperature" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "conductor_row_ampacity_check" CHECK ("ampacity" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "conductor_row_source_check" CHECK (char_length("source") >= 1 and char_length("source") <= 400)
);
--> statement-breakpoint
CREATE TABLE "default_value" (
	"firm_id" uuid NOT NULL,
	"key" text NOT NULL,
	"value" text NOT NULL,
	CONSTRAINT "default_value_pkey" PRIMARY KEY("firm_id","key"),
	CONSTRAINT "default_value_key_check" CHECK (char_length("default_value"."key") <= 60),
	CONSTRAINT "default_value_value_check" CHECK (char_length("default_value"."value") <= 80)
);
--> statement-breakpoint
CREATE TABLE "limit_preset" (
	"firm_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"clause" text NOT NULL,
	"force" text NOT NULL,
	"include_service" boolean NOT NULL,
	"include_transformer" boolean NOT NULL,
	"include_source" boolean NOT NULL,
	"long_run" boolean NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "limit_preset_pkey" PRIMARY KEY("firm_id","id"),
	CONSTRAINT "limit_preset_force_check" CHECK ("force" in ('recommendation', 'mandatory'))
);
--> statement-breakpoint
CREATE TABLE "preset_limit" (
	"firm_id" uuid NOT NULL,
	"preset_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"class" text,
	"kind" text NOT NULL,
	"at_volts" text,
	"value" text NOT NULL,
	CONSTRAINT "preset_limit_pkey" PRIMARY KEY("firm_id","preset_id","position"),
	CONSTRAINT "preset_limit_class_check" CHECK ("class" in ('lighting', 'receptacle', 'motor', 'heat', 'cooling', 'kitchen', 'sensitive', 'emergency', 'fire-pump', 'ev', 'generation', 'equipment')),
	CONSTRAINT "preset_limit_kind_check" CHECK ("kind" in ('feeder', 'branch', 'total', 'starting', 'rise', 'lowest-volts', 'highest-volts', 'rating-low', 'rating-high')),
	CONSTRAINT "preset_limit_at_volts_check" CHECK ("at_volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "preset_limit_value_check" CHECK ("value" ~ '^-?\d{1,12}(\.\d{1,12})?$')
);
--> statement-breakpoint
CREATE TABLE "job" (
	"firm_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"address" text,
	"building" text,
	"area" text,
	"code_edition" text,
	"authority" text,
	"permit_number" text,
	"frequency" text NOT NULL,
	"basis" text NOT NULL,
	"angle" text NOT NULL,
	"length_unit" text NOT NULL,
	"wire_unit" text NOT NULL,
	"limit_preset" text,
	"limit_basis" text,
	"limit_force" text NOT NULL,
	"include_service" boolean NOT NULL,
	"include_transformer" boolean NOT NULL,
	"include_source" boolean NOT NULL,
	"long_run" boolean NOT NULL,
	"head_seq" integer DEFAULT 0 NOT NULL,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"created_by" uuid,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_by" uuid,
	CONSTRAINT "job_pkey" PRIMARY KEY("firm_id","id"),
	CONSTRAINT "job_name_check" CHECK (char_length("name") >= 1 and char_length("name") <= 400),
	CONSTRAINT "job_address_check" CHECK (char_length("address") <= 400),
	CONSTRAINT "job_building_check" CHECK (char_length("building") <= 400),
	CONSTRAINT "job_area_check" CHECK (char_length("area") <= 400),
	CONSTRAINT "job_code_edition_check" CHECK (char_length("code_edition") <= 400),
	CONSTRAINT "job_authority_check" CHECK (char_length("authority") <= 400),
	CONSTRAINT "job_permit_number_check" CHECK (char_length("permit_number") <= 400),
	CONSTRAINT "job_frequency_check" CHECK ("frequency" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_basis_check" CHECK ("basis" in ('impedance', 'resistance')),
	CONSTRAINT "job_angle_check" CHECK ("angle" in ('nominal', 'local')),
	CONSTRAINT "job_length_unit_check" CHECK ("length_unit" in ('ft', 'm')),
	CONSTRAINT "job_wire_unit_check" CHECK ("wire_unit" in ('awg', 'mm2')),
	CONSTRAINT "job_limit_preset_check" CHECK (char_length("limit_preset") <= 400),
	CONSTRAINT "job_limit_basis_check" CHECK (char_length("limit_basis") <= 400),
	CONSTRAINT "job_limit_force_check" CHECK ("limit_force" in ('recommendation', 'mandatory'))
);
--> statement-breakpoint
CREATE TABLE "draft" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"table_name" text NOT NULL,
	"row_id" uuid NOT NULL,
	"field" text NOT NULL,
	"text" text NOT NULL,
	CONSTRAINT "draft_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "draft_table_name_check" CHECK (char_length("table_name") <= 40),
	CONSTRAINT "draft_field_check" CHECK (char_length("field") <= 40),
	CONSTRAINT "draft_text_check" CHECK (char_length("text") <= 400)
);
--> statement-breakpoint
CREATE TABLE "job_conductor" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"material" text NOT NULL,
	"area_mm2" text NOT NULL,
	"r" text NOT NULL,
	"x" text NOT NULL,
	"per" text NOT NULL,
	"temperature" text NOT NULL,
	"ampacity" text,
	"source" text NOT NULL,
	CONSTRAINT "job_conductor_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "job_conductor_name_check" CHECK (char_length("name") >= 1 and char_length("name") <= 80),
	CONSTRAINT "job_conductor_material_check" CHECK ("material" in ('copper', 'aluminum')),
	CONSTRAINT "job_conductor_area_mm2_check" CHECK ("area_mm2" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_conductor_r_check" CHECK ("r" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_conductor_x_check" CHECK ("x" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_conductor_per_check" CHECK ("per" in ('1000ft', 'km')),
	CONSTRAINT "job_conductor_temperature_check" CHECK ("temperature" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_conductor_ampacity_check" CHECK ("ampacity" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_conductor_source_check" CHECK (char_length("source") >= 1 and char_length("source") <= 400)
);
--> statement-breakpoint
CREATE TABLE "reading" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"bus_id" uuid NOT NULL,
	"terminals" text NOT NULL,
	"volts" text NOT NULL,
	"amps" text,
	"at" text NOT NULL,
	CONSTRAINT "reading_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "reading_terminals_check" CHECK ("terminals" in ('L1-N', 'L2-N', 'L3-N', 'L1-L2', 'L2-L3', 'L1-L3')),
	CONSTRAINT "reading_volts_check" CHECK ("volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "reading_amps_check" CHECK ("amps" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "reading_at_check" CHECK ("at" ~ '^(?:(?:\d\d[2468][048]|\d\d[13579][26]|\d\d0[48]|[02468][048]00|[13579][26]00)-02-29|\d{4}-(?:(?:0[13578]|1[02])-(?:0[1-9]|[12]\d|3[01])|(?:0[469]|11)-(?:0[1-9]|[12]\d|30)|(?:02)-(?:0[1-9]|1\d|2[0-8])))T(?:(?:[01]\d|2[0-3]):[0-5]\d:[0-5]\d(?:\.\d+)?(?:Z|([+-](?:[01]\d|2[0-3]):[0-5]\d)))$')
);
--> statement-breakpoint
CREATE TABLE "job_limit" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"class" text,
	"kind" text NOT NULL,
	"at_volts" text,
	"value" text NOT NULL,
	CONSTRAINT "job_limit_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "job_limit_class_check" CHECK ("class" in ('lighting', 'receptacle', 'motor', 'heat', 'cooling', 'kitchen', 'sensitive', 'emergency', 'fire-pump', 'ev', 'generation', 'equipment')),
	CONSTRAINT "job_limit_kind_check" CHECK ("kind" in ('feeder', 'branch', 'total', 'starting', 'rise', 'lowest-volts', 'highest-volts', 'rating-low', 'rating-high')),
	CONSTRAINT "job_limit_at_volts_check" CHECK ("at_volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "job_limit_value_check" CHECK ("value" ~ '^-?\d{1,12}(\.\d{1,12})?$')
);
--> statement-breakpoint
CREATE TABLE "job_verdict" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"at_seq" integer NOT NULL,
	"solver_version" text NOT NULL,
	"worst_percent" double precision,
	"over" integer NOT NULL,
	"near" integer NOT NULL,
	"within" integer NOT NULL,
	"left_out" integer NOT NULL,
	CONSTRAINT "job_verdict_pkey" PRIMARY KEY("firm_id","job_id")
);
--> statement-breakpoint
CREATE TABLE "load" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"order_key" text COLLATE "C" NOT NULL,
	"circuit_id" uuid,
	"bus_id" uuid,
	"along_run_id" uuid,
	"name" text,
	"terminals" text NOT NULL,
	"size" text,
	"size_assumed" boolean NOT NULL,
	"power_factor" text,
	"power_factor_assumed" boolean NOT NULL,
	"leading" boolean NOT NULL,
	"quantity" text,
	"behaviour" text NOT NULL,
	"demand" text,
	"demand_va" text,
	"minimum" text,
	"continuous" boolean NOT NULL,
	"class" text NOT NULL,
	"rated_volts" text,
	"starting_amps" text,
	"starting_power_factor" text,
	CONSTRAINT "load_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "load_code_check" CHECK (char_length("code") >= 1 and char_length("code") <= 80),
	CONSTRAINT "load_order_key_check" CHECK (char_length("order_key") >= 1 and char_length("order_key") <= 64),
	CONSTRAINT "load_name_check" CHECK (char_length("name") <= 400),
	CONSTRAINT "load_terminals_check" CHECK ("terminals" in ('L1-N', 'L2-N', 'L3-N', 'L1-L2', 'L2-L3', 'L1-L3', 'three-phase')),
	CONSTRAINT "load_size_check" CHECK ("size" ~ '^-?\d{1,12}(\.\d{1,12})? (A|VA|kVA|W|kW|hp)$'),
	CONSTRAINT "load_power_factor_check" CHECK ("power_factor" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_quantity_check" CHECK ("quantity" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_behaviour_check" CHECK ("behaviour" in ('current', 'power', 'impedance')),
	CONSTRAINT "load_demand_check" CHECK ("demand" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_demand_va_check" CHECK ("demand_va" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_minimum_check" CHECK ("minimum" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_class_check" CHECK ("class" in ('lighting', 'receptacle', 'motor', 'heat', 'cooling', 'kitchen', 'sensitive', 'emergency', 'fire-pump', 'ev', 'generation', 'equipment')),
	CONSTRAINT "load_rated_volts_check" CHECK ("rated_volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_starting_amps_check" CHECK ("starting_amps" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "load_starting_power_factor_check" CHECK ("starting_power_factor" ~ '^-?\d{1,12}(\.\d{1,12})?$')
);
--> statement-breakpoint
CREATE TABLE "run" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"order_key" text COLLATE "C" NOT NULL,
	"kind" text NOT NULL,
	"name" text,
	"circuit_id" uuid,
	"from_bus_id" uuid NOT NULL,
	"to_bus_id" uuid NOT NULL,
	"length" text,
	"length_state" text,
	"open" boolean NOT NULL,
	"conductors" text[] NOT NULL,
	"material" text NOT NULL,
	"size" text,
	"neutral_size" text,
	"sets" integer NOT NULL,
	"raceway" text,
	"raceway_size" text,
	"temperature" text,
	"temperature_operating" boolean NOT NULL,
	"ambient" text,
	"insulation" integer,
	"terminals" integer,
	"bundled" integer,
	"method" text,
	"grounding_size" text,
	"protection" text NOT NULL,
	"ohms_r" text,
	"ohms_x" text,
	"ohms_per" text,
	"ohms_neutral_r" text,
	"ohms_neutral_x" text,
	"demand" text,
	"breaker_amps" text,
	"breaker_poles" integer,
	"locked" boolean NOT NULL,
	"floor_override" text,
	"notes" text,
	CONSTRAINT "run_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "run_code_check" CHECK (char_length("code") >= 1 and char_length("code") <= 80),
	CONSTRAINT "run_order_key_check" CHECK (char_length("order_key") >= 1 and char_length("order_key") <= 64),
	CONSTRAINT "run_kind_check" CHECK ("kind" in ('service', 'feeder', 'branch')),
	CONSTRAINT "run_name_check" CHECK (char_length("name") <= 400),
	CONSTRAINT "run_length_check" CHECK ("length" ~ '^-?\d{1,12}(\.\d{1,12})? (ft|in|yd|mi|m|cm|km)$'),
	CONSTRAINT "run_length_state_check" CHECK ("length_state" in ('measured', 'scaled', 'assumed')),
	CONSTRAINT "run_conductors_check" CHECK (cardinality("conductors") >= 1 and cardinality("conductors") <= 4 and "conductors" <@ array['L1', 'L2', 'L3', 'N']::text[]),
	CONSTRAINT "run_material_check" CHECK ("material" in ('copper', 'aluminum')),
	CONSTRAINT "run_size_check" CHECK (char_length("size") <= 400),
	CONSTRAINT "run_neutral_size_check" CHECK (char_length("neutral_size") <= 400),
	CONSTRAINT "run_sets_check" CHECK ("sets" >= 1 and "sets" <= 50),
	CONSTRAINT "run_raceway_check" CHECK ("raceway" in ('pvc', 'aluminum', 'steel', 'cable')),
	CONSTRAINT "run_raceway_size_check" CHECK (char_length("raceway_size") <= 400),
	CONSTRAINT "run_temperature_check" CHECK ("temperature" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_ambient_check" CHECK ("ambient" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_insulation_check" CHECK ("insulation" >= 1 and "insulation" <= 250),
	CONSTRAINT "run_terminals_check" CHECK ("terminals" >= 1 and "terminals" <= 250),
	CONSTRAINT "run_bundled_check" CHECK ("bundled" >= 1 and "bundled" <= 200),
	CONSTRAINT "run_method_check" CHECK ("method" in ('A1', 'A2', 'B1', 'B2', 'C', 'D1', 'D2', 'E', 'F', 'G')),
	CONSTRAINT "run_grounding_size_check" CHECK (char_length("grounding_size") <= 400),
	CONSTRAINT "run_protection_check" CHECK ("protection" in ('general', 'motor', 'transformer', 'tap', 'dwelling-83')),
	CONSTRAINT "run_ohms_r_check" CHECK ("ohms_r" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_ohms_x_check" CHECK ("ohms_x" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_ohms_per_check" CHECK ("ohms_per" in ('1000ft', 'km')),
	CONSTRAINT "run_ohms_neutral_r_check" CHECK ("ohms_neutral_r" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_ohms_neutral_x_check" CHECK ("ohms_neutral_x" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_demand_check" CHECK ("demand" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_breaker_amps_check" CHECK ("breaker_amps" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "run_breaker_poles_check" CHECK ("breaker_poles" >= 1 and "breaker_poles" <= 3),
	CONSTRAINT "run_floor_override_check" CHECK (char_length("floor_override") <= 400),
	CONSTRAINT "run_notes_check" CHECK (char_length("notes") <= 4000)
);
--> statement-breakpoint
CREATE TABLE "source" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"order_key" text COLLATE "C" NOT NULL,
	"bus_id" uuid NOT NULL,
	"system" text NOT NULL,
	"volts" text,
	"open_volts" text,
	"off" boolean NOT NULL,
	"impedance_r" text,
	"impedance_x" text,
	"fault_amps" text,
	"fault_x_over_r" text,
	CONSTRAINT "source_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "source_code_check" CHECK (char_length("code") >= 1 and char_length("code") <= 80),
	CONSTRAINT "source_order_key_check" CHECK (char_length("order_key") >= 1 and char_length("order_key") <= 64),
	CONSTRAINT "source_system_check" CHECK ("system" in ('dc-2w', '1ph-2w', '1ph-3w', '1ph-3w-wye', '3ph-3w', '3ph-4w', '3ph-4w-delta')),
	CONSTRAINT "source_volts_check" CHECK ("volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "source_open_volts_check" CHECK ("open_volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "source_impedance_r_check" CHECK ("impedance_r" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "source_impedance_x_check" CHECK ("impedance_x" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "source_fault_amps_check" CHECK ("fault_amps" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "source_fault_x_over_r_check" CHECK ("fault_x_over_r" ~ '^-?\d{1,12}(\.\d{1,12})?$')
);
--> statement-breakpoint
CREATE TABLE "transformer" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"code" text NOT NULL,
	"order_key" text COLLATE "C" NOT NULL,
	"from_bus_id" uuid NOT NULL,
	"to_bus_id" uuid NOT NULL,
	"kva" text,
	"primary_volts" text,
	"secondary_volts" text,
	"connection" text NOT NULL,
	"primary" text NOT NULL,
	"percent_z" text,
	"x_over_r" text,
	"tap_percent" text,
	"system" text NOT NULL,
	CONSTRAINT "transformer_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "transformer_code_check" CHECK (char_length("code") >= 1 and char_length("code") <= 80),
	CONSTRAINT "transformer_order_key_check" CHECK (char_length("order_key") >= 1 and char_length("order_key") <= 64),
	CONSTRAINT "transformer_kva_check" CHECK ("kva" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "transformer_primary_volts_check" CHECK ("primary_volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "transformer_secondary_volts_check" CHECK ("secondary_volts" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "transformer_connection_check" CHECK ("connection" in ('delta-wye', 'wye-wye', 'delta-delta', 'wye-delta', 'single-phase')),
	CONSTRAINT "transformer_primary_check" CHECK ("primary" in ('L1-N', 'L2-N', 'L3-N', 'L1-L2', 'L2-L3', 'L1-L3', 'three-phase')),
	CONSTRAINT "transformer_percent_z_check" CHECK ("percent_z" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "transformer_x_over_r_check" CHECK ("x_over_r" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "transformer_tap_percent_check" CHECK ("tap_percent" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "transformer_system_check" CHECK ("system" in ('dc-2w', '1ph-2w', '1ph-3w', '1ph-3w-wye', '3ph-3w', '3ph-4w', '3ph-4w-delta'))
);
--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text NOT NULL,
	"time_zone" text DEFAULT 'UTC' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "revision" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"no" integer NOT NULL,
	"seq" integer NOT NULL,
	"scenario" text NOT NULL,
	"paper" text NOT NULL,
	"input" jsonb NOT NULL,
	"result" jsonb NOT NULL,
	"solver_version" text NOT NULL,
	"sha256" text NOT NULL,
	"worst_percent" double precision,
	"over" integer NOT NULL,
	"near" integer NOT NULL,
	"within" integer NOT NULL,
	"issued_by" uuid NOT NULL,
	"issued_at" timestamp with time zone NOT NULL,
	CONSTRAINT "revision_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "revision_sha256_check" CHECK ("revision"."sha256" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "revision_scenario_check" CHECK ("scenario" in ('design', 'each-circuit', 'everything-on', 'light', 'starting')),
	CONSTRAINT "revision_paper_check" CHECK ("paper" in ('letter', 'a4'))
);
--> statement-breakpoint
CREATE TABLE "revision_pdf" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"state" text NOT NULL,
	"pdf" "bytea",
	"last_error" text,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "revision_pdf_pkey" PRIMARY KEY("firm_id","job_id","revision_id"),
	CONSTRAINT "revision_pdf_state_check" CHECK ("state" in ('waiting', 'ready', 'failed')),
	CONSTRAINT "revision_pdf_ready_check" CHECK (("revision_pdf"."state" = 'ready') = ("revision_pdf"."pdf" is not null))
);
--> statement-breakpoint
CREATE TABLE "breaker" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"circuit_id" uuid NOT NULL,
	"space" integer NOT NULL,
	"half" text,
	"poles" integer NOT NULL,
	"amps" text,
	CONSTRAINT "breaker_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "breaker_space_check" CHECK ("space" >= 1 and "space" <= 200),
	CONSTRAINT "breaker_half_check" CHECK ("half" in ('a', 'b')),
	CONSTRAINT "breaker_poles_check" CHECK ("poles" >= 1 and "poles" <= 3),
	CONSTRAINT "breaker_amps_check" CHECK ("amps" ~ '^-?\d{1,12}(\.\d{1,12})?$')
);
--> statement-breakpoint
CREATE TABLE "circuit" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"order_key" text COLLATE "C" NOT NULL,
	"panel_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"description" text,
	"room" text,
	"load_type" text,
	"notes" text,
	CONSTRAINT "circuit_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "circuit_order_key_check" CHECK (char_length("order_key") >= 1 and char_length("order_key") <= 64),
	CONSTRAINT "circuit_kind_check" CHECK ("kind" in ('branch', 'feeder', 'spare', 'reserved', 'feed-through')),
	CONSTRAINT "circuit_description_check" CHECK (char_length("description") <= 400),
	CONSTRAINT "circuit_room_check" CHECK (char_length("room") <= 400),
	CONSTRAINT "circuit_load_type_check" CHECK (char_length("load_type") <= 400),
	CONSTRAINT "circuit_notes_check" CHECK (char_length("notes") <= 4000)
);
--> statement-breakpoint
CREATE TABLE "panel" (
	"firm_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"bus_id" uuid NOT NULL,
	"building" text,
	"area" text,
	"layout" text NOT NULL,
	"spaces" integer NOT NULL,
	"lines" text[] NOT NULL,
	"main_amps" text,
	"mounting" text,
	"notes" text,
	CONSTRAINT "panel_pkey" PRIMARY KEY("firm_id","job_id","id"),
	CONSTRAINT "panel_building_check" CHECK (char_length("building") <= 400),
	CONSTRAINT "panel_area_check" CHECK (char_length("area") <= 400),
	CONSTRAINT "panel_layout_check" CHECK ("layout" in ('two-column', 'sequential', 'three-phase-ways')),
	CONSTRAINT "panel_spaces_check" CHECK ("spaces" >= 1 and "spaces" <= 200),
	CONSTRAINT "panel_lines_check" CHECK (cardinality("lines") >= 1 and cardinality("lines") <= 3 and "lines" <@ array['L1', 'L2', 'L3', 'N']::text[]),
	CONSTRAINT "panel_main_amps_check" CHECK ("main_amps" ~ '^-?\d{1,12}(\.\d{1,12})?$'),
	CONSTRAINT "panel_mounting_check" CHECK (char_length("mounting") <= 400),
	CONSTRAINT "panel_notes_check" CHECK (char_length("notes") <= 4000)
);
--> statement-breakpoint
CREATE TABLE "rate_counter" (
	"key" text NOT NULL,
	"window_start" timestamp with time zone NOT NULL,
	"hits" integer NOT NULL,
	CONSTRAINT "rate_counter_pkey" PRIMARY KEY("key","window_start")
);
--> statement-breakpoint
CREATE TABLE "session" (
	"sid" varchar PRIMARY KEY NOT NULL,
	"sess" json NOT NULL,
	"expire" timestamp (6) NOT NULL
);
--> statement-breakpoint
CREATE TABLE "token" (
	"hash" text PRIMARY KEY NOT NULL,
	"id" uuid NOT NULL,
	"purpose" text NOT NULL,
	"person_id" uuid,
	"firm_id" uuid,
	"invitation_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	CONSTRAINT "token_purpose_check" CHECK ("purpose" in ('reset', 'invite'))
);
--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "bus" ADD CONSTRAINT "bus_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_entered_by_person_id_fk" FOREIGN KEY ("entered_by") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_revision_id_fkey" FOREIGN KEY ("firm_id","job_id","revision_id") REFERENCES "public"."revision"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decision" ADD CONSTRAINT "decision_delivery_id_fkey" FOREIGN KEY ("firm_id","job_id","delivery_id") REFERENCES "public"."delivery"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "delivery" ADD CONSTRAINT "delivery_queued_by_person_id_fk" FOREIGN KEY ("queued_by") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "delivery" ADD CONSTRAINT "delivery_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "delivery" ADD CONSTRAINT "delivery_revision_id_fkey" FOREIGN KEY ("firm_id","job_id","revision_id") REFERENCES "public"."revision"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "link_index" ADD CONSTRAINT "link_index_delivery_fkey" FOREIGN KEY ("firm_id","job_id","delivery_id") REFERENCES "public"."delivery"("firm_id","job_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_edit" ADD CONSTRAINT "job_edit_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_edit" ADD CONSTRAINT "job_edit_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_invited_by_fkey" FOREIGN KEY ("invited_by") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "conductor_row" ADD CONSTRAINT "conductor_row_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "default_value" ADD CONSTRAINT "default_value_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "limit_preset" ADD CONSTRAINT "limit_preset_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "preset_limit" ADD CONSTRAINT "preset_limit_preset_fkey" FOREIGN KEY ("firm_id","preset_id") REFERENCES "public"."limit_preset"("firm_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_created_by_person_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_changed_by_person_id_fk" FOREIGN KEY ("changed_by") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_conductor" ADD CONSTRAINT "job_conductor_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_limit" ADD CONSTRAINT "job_limit_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_verdict" ADD CONSTRAINT "job_verdict_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "load" ADD CONSTRAINT "load_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "load" ADD CONSTRAINT "load_circuit_id_fkey" FOREIGN KEY ("firm_id","job_id","circuit_id") REFERENCES "public"."circuit"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "load" ADD CONSTRAINT "load_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "load" ADD CONSTRAINT "load_along_run_id_fkey" FOREIGN KEY ("firm_id","job_id","along_run_id") REFERENCES "public"."run"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_circuit_id_fkey" FOREIGN KEY ("firm_id","job_id","circuit_id") REFERENCES "public"."circuit"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_from_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","from_bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_to_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","to_bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "source" ADD CONSTRAINT "source_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "source" ADD CONSTRAINT "source_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "transformer" ADD CONSTRAINT "transformer_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "transformer" ADD CONSTRAINT "transformer_from_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","from_bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "transformer" ADD CONSTRAINT "transformer_to_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","to_bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_issued_by_person_id_fk" FOREIGN KEY ("issued_by") REFERENCES "public"."person"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_pdf" ADD CONSTRAINT "revision_pdf_revision_fkey" FOREIGN KEY ("firm_id","job_id","revision_id") REFERENCES "public"."revision"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "breaker" ADD CONSTRAINT "breaker_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "breaker" ADD CONSTRAINT "breaker_circuit_id_fkey" FOREIGN KEY ("firm_id","job_id","circuit_id") REFERENCES "public"."circuit"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "circuit" ADD CONSTRAINT "circuit_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "circuit" ADD CONSTRAINT "circuit_panel_id_fkey" FOREIGN KEY ("firm_id","job_id","panel_id") REFERENCES "public"."panel"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "panel" ADD CONSTRAINT "panel_job_fkey" FOREIGN KEY ("firm_id","job_id") REFERENCES "public"."job"("firm_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "panel" ADD CONSTRAINT "panel_bus_id_fkey" FOREIGN KEY ("firm_id","job_id","bus_id") REFERENCES "public"."bus"("firm_id","job_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "token" ADD CONSTRAINT "token_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "token" ADD CONSTRAINT "token_firm_id_firm_firm_id_fk" FOREIGN KEY ("firm_id") REFERENCES "public"."firm"("firm_id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "audit_event_at_idx" ON "audit_event" USING btree ("firm_id","at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "decision_revision_id_idx" ON "decision" USING btree ("firm_id","job_id","revision_id");--> statement-breakpoint
CREATE INDEX "decision_delivery_id_idx" ON "decision" USING btree ("firm_id","job_id","delivery_id");--> statement-breakpoint
CREATE INDEX "delivery_revision_id_idx" ON "delivery" USING btree ("firm_id","job_id","revision_id");--> statement-breakpoint
CREATE INDEX "link_index_delivery_idx" ON "link_index" USING btree ("firm_id","job_id","delivery_id");--> statement-breakpoint
CREATE UNIQUE INDEX "job_edit_edit_id_key" ON "job_edit" USING btree ("firm_id","job_id","edit_id");--> statement-breakpoint
CREATE UNIQUE INDEX "invitation_pending_email_key" ON "invitation" USING btree ("firm_id",lower("email")) WHERE accepted_at is null and withdrawn_at is null;--> statement-breakpoint
CREATE INDEX "membership_person_idx" ON "membership" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "conductor_row_name_key" ON "conductor_row" USING btree ("firm_id","name");--> statement-breakpoint
CREATE INDEX "job_changed_at_idx" ON "job" USING btree ("firm_id","changed_at" DESC NULLS LAST);--> statement-breakpoint
CREATE INDEX "reading_bus_id_idx" ON "reading" USING btree ("firm_id","job_id","bus_id");--> statement-breakpoint
CREATE INDEX "load_circuit_id_idx" ON "load" USING btree ("firm_id","job_id","circuit_id");--> statement-breakpoint
CREATE INDEX "load_bus_id_idx" ON "load" USING btree ("firm_id","job_id","bus_id");--> statement-breakpoint
CREATE INDEX "load_along_run_id_idx" ON "load" USING btree ("firm_id","job_id","along_run_id");--> statement-breakpoint
CREATE INDEX "run_circuit_id_idx" ON "run" USING btree ("firm_id","job_id","circuit_id");--> statement-breakpoint
CREATE INDEX "run_from_bus_id_idx" ON "run" USING btree ("firm_id","job_id","from_bus_id");--> statement-breakpoint
CREATE INDEX "run_to_bus_id_idx" ON "run" USING btree ("firm_id","job_id","to_bus_id");--> statement-breakpoint
CREATE INDEX "source_bus_id_idx" ON "source" USING btree ("firm_id","job_id","bus_id");--> statement-breakpoint
CREATE INDEX "transformer_from_bus_id_idx" ON "transformer" USING btree ("firm_id","job_id","from_bus_id");--> statement-breakpoint
CREATE INDEX "transformer_to_bus_id_idx" ON "transformer" USING btree ("firm_id","job_id","to_bus_id");--> statement-breakpoint
CREATE UNIQUE INDEX "person_email_key" ON "person" USING btree (lower("email"));--> statement-breakpoint
CREATE UNIQUE INDEX "revision_no_key" ON "revision" USING btree ("firm_id","job_id","no");--> statement-breakpoint
CREATE INDEX "breaker_circuit_id_idx" ON "breaker" USING btree ("firm_id","job_id","circuit_id");--> statement-breakpoint
CREATE INDEX "circuit_panel_id_idx" ON "circuit" USING btree ("firm_id","job_id","panel_id");--> statement-breakpoint
CREATE INDEX "panel_bus_id_idx" ON "panel" USING btree ("firm_id","job_id","bus_id");--> statement-breakpoint
CREATE INDEX "rate_counter_window_start_idx" ON "rate_counter" USING btree ("window_start");--> statement-breakpoint
CREATE INDEX "session_expire_idx" ON "session" USING btree ("expire");--> statement-breakpoint
CREATE INDEX "session_person_idx" ON "session" USING btree (("sess" -> 'passport' ->> 'user'));--> statement-breakpoint
CREATE UNIQUE INDEX "token_id_key" ON "token" USING btree ("id");--> statement-breakpoint
CREATE INDEX "token_person_idx" ON "token" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "token_invitation_idx" ON "token" USING btree ("firm_id","invitation_id");