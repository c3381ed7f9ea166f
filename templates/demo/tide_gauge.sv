// A tide gauge on a buoy: measures the water, keeps what the harbour office sets, reports by radio, and lights a lantern.
module tide_gauge (
    input  logic        clk,
    input  logic        rst_n,
    input  logic        adc_valid,
    input  logic [11:0] adc_data,
    input  logic        bus_write,
    input  logic [4:0]  bus_address,
    input  logic [15:0] bus_data,
    output logic [15:0] bus_read,
    input  logic [3:0]  journal_line,
    output logic [15:0] journal_data,
    input  logic        radio_ready,
    output logic        radio_carrier,
    output logic        radio_symbol,
    output logic [15:0] reports,
    input  logic        dark,
    input  logic [3:0]  straps,
    output logic        lamp,
    output logic [3:0]  lamp_mode,
    output logic [11:0] level,
    output logic [11:0] mean,
    output logic [11:0] highest,
    output logic [11:0] lowest,
    output logic        alarm,
    output logic [15:0] uptime
);
    // The reset leaves together with the clock for the parts that want it synchronous.
    logic rst, rst_early;
    always_ff @(posedge clk or negedge rst_n) begin
        if (!rst_n) {rst, rst_early} <= 2'b11;
        else {rst, rst_early} <= {rst_early, 1'b0};
    end

    logic [11:0] datum, alarm_level;
    logic [15:0] report_every;
    logic [7:0]  station;

    settings u_settings (
        .clk, .rst,
        .write(bus_write), .address(bus_address), .data(bus_data), .journal_line,
        .datum, .alarm_level, .report_every, .station, .read_data(bus_read), .journal_data
    );

    water_level #(.W(12)) u_water (
        .clk, .rst_n, .adc_valid, .adc_data, .datum,
        .new_survey(bus_write && bus_address == 5'd4),
        .level, .mean, .highest, .lowest, .uptime
    );

    // A report is due every so many samples.
    logic [15:0] countdown;
    wire due = adc_valid && countdown == 16'd0;
    always_ff @(posedge clk) begin
        if (rst) countdown <= 16'd3;
        else if (adc_valid) countdown <= due ? report_every : countdown - 16'd1;
    end

    uplink u_uplink (
        .clk(clk), .rst(rst), .start(due), .report({station, level, mean}),
        .ready(radio_ready), .carrier(radio_carrier), .symbol(radio_symbol), .sent(reports)
    );

    // The alarm stays until somebody looks: one bit, not worth a cell.
    always_ff @(posedge clk) begin
        if (rst) alarm <= 1'b0;
        else if (adc_valid && mean > alarm_level) alarm <= 1'b1;
        else if (bus_write && bus_address == 5'd5) alarm <= 1'b0;
    end

    lantern u_lantern (
        .clk, .rst_n, .dark, .step(adc_valid),
        .load(bus_write && bus_address == 5'd6), .pattern_in(bus_data[7:0]),
        .straps, .lamp, .mode(lamp_mode)
    );
endmodule
